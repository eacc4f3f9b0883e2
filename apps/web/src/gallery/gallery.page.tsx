import { useState, type ReactNode } from 'react'
import { useTitle } from '../layouts/accent'
import { PublicFoot } from '../layouts/public-foot'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { Bill, Facts } from '../ui/facts'
import { PageHead } from '../ui/page-head'
import { PlaceTicks, placesLeft } from '../ui/place-ticks'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { Steps } from '../ui/steps'
import { Tag } from '../ui/tag'
import { toast } from '../ui/toast'
import { Notice } from '../ui/notice'
import { GalleryCard } from './gallery-card'
import { GalleryFields } from './gallery-fields'

/** Every component of the design, in its states. */
export default function GalleryPage() {
  useTitle('Components – Marram')
  const [isOpen, setIsOpen] = useState(false)
  return (
    <>
      <main id="main" className="wrap">
        <PageHead
          title="Components"
          sub="What the pages are made of, each in its states, in the light and after dusk."
        />
        <Part name="Type">
          <h1>Besley speaks</h1>
          <p className="lead">Sofia Sans reads: l, I and 1 are told apart in glare.</p>
          <p className="num">Sofia Sans Semi Condensed counts: 108.00 145.00 −18.00</p>
        </Part>
        <Part name="Buttons">
          <div className="actions">
            <Button kind="go">Take a place</Button>
            <Button>Change</Button>
            <Button kind="quiet">Do this later</Button>
            <Button kind="danger">Call off</Button>
            <Button waiting="Paying…">Pay</Button>
            <Button isBig>Big</Button>
          </div>
          <div className="mt-3">
            <Button reason="The register opens an hour before the session.">Close register</Button>
          </div>
        </Part>
        <Part name="Marks, ticks and the card">
          <GalleryCard />
          <p className="actions mt-4">
            <PlaceTicks taken={4} capacity={6} />
            {placesLeft({ taken: 4, capacity: 6, waiting: 0 })}
            <PlaceTicks taken={6} capacity={6} />
            {placesLeft({ taken: 6, capacity: 6, waiting: 2 })}
            <PlaceTicks taken={9} capacity={14} />
            {placesLeft({ taken: 9, capacity: 14, waiting: 0 })}
          </p>
        </Part>
        <Part name="Sentence and fields">
          <GalleryFields />
        </Part>
        <Part name="Facts and bills">
          <div className="kcols mt-0">
            <Facts
              facts={[
                ['When', 'Tuesdays, 17:45–18:45'],
                ['Where', 'Range bays, bays 1 to 6 of 12'],
              ]}
            />
            <Bill
              lines={[
                ['Eight sessions', '€108.00'],
                ['Tax in it', '€8.92'],
                ['To pay', '€108.00'],
              ]}
            />
          </div>
        </Part>
        <Part name="Notices and tags">
          <div className="grid gap-3">
            <Notice>No signal. 3 marks kept on this phone.</Notice>
            <Notice kind="ok">All of it agrees with the payouts.</Notice>
            <Notice kind="flag" action={<Button>Try again</Button>}>
              The payment did not go through. Nothing was taken.
            </Notice>
            <p className="actions">
              <Tag kind="ok" drawing="tick">
                Clear
              </Tag>
              <Tag kind="haar" drawing="dusk">
                Sunset 19:38
              </Tag>
              <Tag kind="flag" drawing="flag">
                9 minutes past sunset
              </Tag>
            </p>
          </div>
        </Part>
        <Part name="Steps">
          <Steps steps={['What', 'Who', 'Pay']} current={1} />
        </Part>
        <Part name="On its way, empty, lost">
          <SkeletonRows rows={3} />
          <EmptyState action={<Button>Write a clinic</Button>}>
            No clinics on the page yet. Say when, where and for how many.
          </EmptyState>
          <ErrorState sentence="The list did not come." onRetry={() => undefined} />
        </Part>
        <Part name="Lying on top">
          <div className="actions">
            <Button onClick={() => setIsOpen(true)}>Open a sheet</Button>
            <Button onClick={() => toast('Marked present.', () => undefined)}>Lay a toast</Button>
          </div>
          <Dialog title="Call off 24 September?" isOpen={isOpen} onClose={() => setIsOpen(false)}>
            <p className="mb-4">6 golfers get a mail now. Each can choose credit or €23.00 back.</p>
            <div className="actions">
              <Button kind="danger" onClick={() => setIsOpen(false)}>
                Call off
              </Button>
              <Button onClick={() => setIsOpen(false)}>Keep it</Button>
            </div>
          </Dialog>
        </Part>
      </main>
      <PublicFoot>Marram</PublicFoot>
    </>
  )
}

function Part({ name, children }: { name: string; children: ReactNode }) {
  return (
    <section>
      <div className="sect">
        <h2>{name}</h2>
      </div>
      <div className="py-4">{children}</div>
    </section>
  )
}
