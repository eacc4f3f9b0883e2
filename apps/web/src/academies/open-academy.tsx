import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useDeferredValue, useState } from 'react'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { routeQuery } from '../api/query'
import { SignInFields, useSignInFields } from '../accounts/sign-in-fields'
import { useSession } from '../accounts/queries'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { InputWord, SelectWord, Sentence } from '../ui/sentence'
import { CURRENCIES, likelyCurrency, ownZone, zoneOptions, type Currency } from './zones'

interface Wanted {
  name: string
  place: string
  /** Empty while the owner has not written one: the name's own is used. */
  slug: string
  zone: string
  currency: Currency
  taxMode: 'included' | 'added'
}

/** The first sentence: who the academy is, where its page is, its time and its money. */
export function OpenAcademy({ onOpened }: { onOpened: (slug: string) => void }) {
  const client = useQueryClient()
  const { data: session } = useSession()
  const signIn = useSignInFields()
  const [wanted, setWanted] = useState<Wanted>(() => {
    const zone = ownZone()
    const currency = likelyCurrency(zone)
    const taxMode = currency === 'USD' ? 'added' : 'included'
    return { name: '', place: '', slug: '', zone, currency, taxMode }
  })
  const set = (change: Partial<Wanted>) => setWanted((had) => ({ ...had, ...change }))
  const address = useAddress(wanted.slug || wanted.name, session?.account !== null)
  const slug = wanted.slug || address.suggestion

  const { form, errors, all, isSending } = useForm(async () => {
    if (!session?.account) await signIn.submit()
    const opened = await call('academies.open', { body: { ...wanted, slug } })
    await client.invalidateQueries()
    onOpened(opened.slug)
  })

  return (
    <form {...form}>
      <Sentence>
        We are{' '}
        <InputWord
          label="Name of the academy"
          value={wanted.name}
          placeholder="your academy"
          isWrong={Boolean(errors['name'])}
          onChange={(name) => set({ name })}
        />{' '}
        in{' '}
        <InputWord
          label="Place"
          value={wanted.place}
          placeholder="county or town"
          isWrong={Boolean(errors['place'])}
          onChange={(place) => set({ place })}
        />
        . Our page is {location.host}/
        <InputWord
          label="Address of the page"
          value={slug}
          placeholder="your-academy"
          isWrong={Boolean(errors['slug']) || !address.isFree}
          onChange={(written) => set({ slug: written.toLowerCase() })}
        />
        . We keep{' '}
        <SelectWord
          label="Time zone"
          value={wanted.zone}
          onChange={(zone) => set({ zone, currency: likelyCurrency(zone) })}
          options={zoneOptions}
        />{' '}
        and count in{' '}
        <SelectWord
          label="Currency"
          value={wanted.currency}
          onChange={(currency) => set({ currency })}
          options={CURRENCIES}
        />
        , with tax{' '}
        <SelectWord
          label="Tax"
          value={wanted.taxMode}
          onChange={(taxMode) => set({ taxMode })}
          options={[
            { value: 'included', label: 'in the price' },
            { value: 'added', label: 'added on top' },
          ]}
        />
        .
      </Sentence>
      {!address.isFree && (
        <p className="flagtext mb-3">The address /{slug} is taken. Try adding the place.</p>
      )}
      {session && !session.account && (
        <div className="my-4 max-w-[28rem]">
          <SignInFields fields={signIn} errors={errors} returnTo={paths.open()} />
        </div>
      )}
      {all && <Notice kind="flag">{all}</Notice>}
      <p className="rowb2 mt-4">
        <Button type="submit" kind="go" isBig waiting={isSending && 'Opening…'}>
          Open the academy
        </Button>
        <span className="soft">All of it can be changed later but the currency.</span>
      </p>
    </form>
  )
}

/** Whether an address is free, and how it is written; asked for as the owner types. */
function useAddress(text: string, maySay: boolean): { isFree: boolean; suggestion: string } {
  const asked = useDeferredValue(text.trim().slice(0, 60))
  const { data } = useQuery({
    ...routeQuery('academies.check-slug', { params: { slug: asked || '-' } }),
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
