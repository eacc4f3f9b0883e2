import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useDeferredValue, useState } from 'react'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { SignInFields, useSignInFields } from '../accounts/sign-in-fields'
import { useSession } from '../accounts/queries'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { OpeningWords, type Opening } from './opening-words'
import { checkSlugQuery } from './queries'
import { likelyCurrency, ownZone, type Currency } from './zones'

interface Wanted extends Pick<Opening, 'name' | 'place' | 'slug' | 'zone'> {
  /** Null while the owner has chosen none: what is likely for the zone is used. */
  currency: Currency | null
  taxMode: Opening['taxMode'] | null
}

const WORD_NAMES = {
  name: 'Name of the academy',
  place: 'Place',
  slug: 'Address of the page',
  zone: 'Time zone',
  currency: 'Currency',
  taxMode: 'Tax',
}

/** The first sentence: who the academy is, where its page is, its time and its money. */
export function OpenAcademy({ onOpened }: { onOpened: (slug: string) => void }) {
  const client = useQueryClient()
  const { data: session } = useSession()
  const signIn = useSignInFields()
  const [wanted, setWanted] = useState<Wanted>(() => ({
    name: '',
    place: '',
    // Empty while the owner has not written one: the name's own is used.
    slug: '',
    zone: ownZone(),
    currency: null,
    taxMode: null,
  }))
  const set = (change: Partial<Wanted>) => setWanted((had) => ({ ...had, ...change }))
  const address = useAddress(wanted.slug || wanted.name, session?.account !== null)
  const slug = wanted.slug || address.suggestion
  const currency = wanted.currency ?? likelyCurrency(wanted.zone)
  const taxMode = wanted.taxMode ?? (currency === 'USD' ? 'added' : 'included')

  const send = async () => {
    if (!session?.account) await signIn.submit()
    const opened = await call('academies.open', { body: { ...wanted, slug, currency, taxMode } })
    await client.invalidateQueries()
    onOpened(opened.slug)
  }
  const { form, errors, sentence, isSending } = useForm(send, {
    beside: ['account'],
    named: WORD_NAMES,
  })

  return (
    <form {...form}>
      <OpeningWords
        wanted={{ ...wanted, slug, currency, taxMode }}
        onChange={set}
        errors={errors}
        isAddressFree={address.isFree}
      />
      {!address.isFree && (
        <p className="flagtext mb-3">The address /{slug} is taken. Try adding the place.</p>
      )}
      {session && !session.account && (
        <div className="my-4 max-w-[28rem]">
          <SignInFields fields={signIn} errors={errors} returnTo={paths.open()} />
        </div>
      )}
      {sentence && <Notice kind="flag">{sentence}</Notice>}
      <p className="rowb2 mt-4">
        <Button type="submit" kind="go" isBig waiting={isSending && 'Opening…'}>
          Open the academy
        </Button>
        <span className="soft">
          The address, the time zone and the currency stay. The rest can be changed later.
        </span>
      </p>
    </form>
  )
}

/** Whether an address is free, and how it is written; asked for as the owner types. */
function useAddress(text: string, maySay: boolean): { isFree: boolean; suggestion: string } {
  const asked = useDeferredValue(text.trim().slice(0, 60))
  const { data } = useQuery({
    ...checkSlugQuery(asked || '-'),
    enabled: asked.length > 1 && maySay,
    retry: false,
  })
  const plain = asked
    .normalize('NFD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '')
  return { isFree: data?.isFree ?? true, suggestion: data?.suggestion ?? plain }
}
