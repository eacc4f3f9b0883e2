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
  /** Null while the owner has chosen none: what is likely for the zone is used. */
  currency: Currency | null
  taxMode: 'included' | 'added' | null
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
          onChange={(zone) => set({ zone })}
          options={zoneOptions}
        />{' '}
        and count in{' '}
        <SelectWord
          label="Currency"
          value={currency}
          onChange={(chosen) => set({ currency: chosen })}
          options={CURRENCIES}
        />
        , with tax{' '}
        <SelectWord
          label="Tax"
          value={taxMode}
          onChange={(chosen) => set({ taxMode: chosen })}
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
