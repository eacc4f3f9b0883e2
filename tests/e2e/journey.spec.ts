import type { Page } from '@playwright/test'
import { expect, lookOver, test } from './fixtures'
import type { Product } from './product'

const PHONE = { width: 390, height: 844 }
const PASSWORD = 'a long enough password'
const DECLINED = '4000000000000002'
const FIRST_SESSION = new Date('2031-03-11T18:05:00.000Z')

test('a golfer pays for a place, the coach takes the register, the owner sees the money', async ({
  product,
  newPerson,
}, { project }) => {
  const slug = `skerrow-${project.name}`
  const owner = await newPerson()
  await test.step('an owner opens an academy', () => openAcademy(owner, { slug }))
  await test.step('and invites the coach', () => inviteCoach(owner, product, { slug }))

  const golfer = await newPerson()
  await test.step('a guardian takes a place for a child', () => takePlace(golfer, { slug }))
  await test.step('the first card is declined, the second pays', () => pay(golfer, product))
  await test.step('a mail with the dates has come', () => readMail(product, { slug }))

  const coach = await newPerson(PHONE)
  await test.step('the coach joins on a phone', () => join(coach, product, { slug }))
  await product.moveClock(FIRST_SESSION)
  await test.step('and takes the register', () => takeRegister(coach, product, { slug }))

  await test.step('the owner sees the money', () => seeMoney(owner, product, { slug }))
  await test.step('and gives some of it back', () => giveBack(owner, product, { slug }))
})

const emailOf = (who: string, slug: string) => `${who}@${slug}.example`

async function openAcademy(page: Page, { slug }: { slug: string }): Promise<void> {
  await page.goto('/open')
  await lookOver(page)
  await page.getByLabel('Name of the academy').fill('Skerrow Golf')
  await page.getByLabel('Place', { exact: true }).fill('Skerrow')
  await page.getByLabel('Address of the page').fill(slug)
  await page.getByLabel('Time zone').selectOption('Europe/Dublin')
  await page.getByLabel('Your name', { exact: true }).fill('Orla Tarrant')
  await page.getByLabel('E-mail', { exact: true }).fill(emailOf('orla', slug))
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD)
  await page.getByRole('button', { name: 'Open the academy' }).click()

  await page.getByLabel('Name of the venue').fill('Skerrow Range')
  await lookOver(page)
  await page.getByLabel('Latitude in degrees').fill('53.4')
  await page.getByLabel('Longitude in degrees').fill('6.1')
  await page.getByLabel('Coach').fill('Fintan Ash')
  await page.getByRole('button', { name: 'Keep the place' }).click()

  await page.getByLabel('First day').fill('2031-03-11')
  await page.getByLabel('Start time').fill('18:00')
  await page.getByLabel('Price of the run').fill('120.00')
  await page.getByLabel('What it is called').fill('Low and long')
  await page.getByLabel('In one line').fill('Ball flight under the wind.')
  await expect(page.getByText('8 dates, 8 clear')).toBeVisible()
  await lookOver(page)
  await page.getByRole('button', { name: 'Keep these dates' }).click()

  await page.getByRole('button', { name: 'Connect payments' }).click()
  await page.getByRole('button', { name: 'Done' }).click()
  await expect(page.getByText('Connected.')).toBeVisible()
  await lookOver(page)
  await page.getByRole('button', { name: 'Put it live' }).click()
  await expect(page.getByRole('heading', { name: /^Week of/ })).toBeVisible()
  await lookOver(page)
}

async function inviteCoach(page: Page, product: Product, { slug }: { slug: string }) {
  await page.goto(`/${slug}/desk/set-up`)
  await lookOver(page)
  await page.getByRole('button', { name: 'Change Fintan Ash' }).click()
  await page.getByRole('dialog').getByLabel('E-mail', { exact: true }).fill(emailOf('fintan', slug))
  await lookOver(page)
  await page.getByRole('button', { name: 'Save coach' }).click()
  await expect(page.getByRole('dialog')).toBeHidden()
  await product.drain()
}

async function takePlace(page: Page, { slug }: { slug: string }): Promise<void> {
  await page.goto(`/${slug}`)
  await lookOver(page)
  await page.getByRole('link', { name: 'Low and long' }).click()
  await expect(page.getByRole('heading', { name: 'Low and long' })).toBeVisible()
  await lookOver(page)
  await page.getByText('Add someone you look after').click()
  await page.getByLabel('Their name').fill('Wren Hollis')
  await page.getByLabel('Date of birth', { exact: true }).fill('2021-05-04')
  await page.getByLabel('Who to call', { exact: true }).fill('Sal Hollis')
  await page.getByLabel('Telephone').fill('+353 85 555 0199')
  await page.getByLabel('I am their guardian').check()
  await page.getByLabel('Your name', { exact: true }).fill('Sal Hollis')
  await page.getByLabel('E-mail', { exact: true }).fill(emailOf('sal', slug))
  await page.getByLabel('Password', { exact: true }).fill('too short')
  await page.getByLabel('I have read this').check()
  await page.getByRole('button', { name: 'Hold my place' }).click()
  await expect(page.getByText('Twelve characters or more.', { exact: true })).toBeVisible()
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD)
  await page.getByRole('button', { name: 'Hold my place' }).click()
  await expect(page.getByRole('heading', { name: 'Before you pay' })).toBeVisible()
  await lookOver(page)
}

async function pay(page: Page, product: Product): Promise<void> {
  await page.getByRole('button', { name: 'Go to payment' }).click()
  await page.getByLabel('Card number').fill(DECLINED)
  await page.getByRole('button', { name: /^Pay EUR/ }).click()
  await expect(page.getByRole('alert')).toBeVisible()
  await product.drain()
  await page.getByRole('link', { name: 'Back' }).click()
  await expect(page.getByText('The payment did not go through.')).toBeVisible()
  await lookOver(page)
  await page.getByRole('button', { name: 'Try again' }).click()
  await page.getByRole('button', { name: /^Pay EUR/ }).click()
  await page.waitForURL(/from=payment/)
  await product.drain()
  await expect(page.getByText('Paid: the place is yours.')).toBeVisible()
  await lookOver(page)
}

async function readMail(product: Product, { slug }: { slug: string }): Promise<void> {
  const mails = await product.mailsTo(emailOf('sal', slug))
  const confirmation = mails.find(({ subject }) => subject.includes('Low and long'))
  expect(confirmation?.attachments.map(({ type }) => type.split(';')[0])).toContain('text/calendar')
}

async function join(page: Page, product: Product, { slug }: { slug: string }): Promise<void> {
  const [invitation] = await product.mailsTo(emailOf('fintan', slug))
  const link = /https?:\/\/\S+\/invitation#\S+/.exec(invitation?.text ?? '')?.[0]
  await page.goto(link ?? '/no-link')
  await page.getByLabel('Your name', { exact: true }).fill('Fintan Ash')
  await page.getByLabel('E-mail', { exact: true }).fill(emailOf('fintan', slug))
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD)
  await lookOver(page)
  await page.getByRole('button', { name: 'Join Skerrow Golf' }).click()
  await expect(page.getByText('No session on this day.')).toBeVisible()
  await lookOver(page)
}

async function takeRegister(page: Page, product: Product, { slug }: { slug: string }) {
  await page.clock.setSystemTime(FIRST_SESSION)
  await page.goto(`/${slug}/desk/today`)
  await expect(page.getByRole('heading', { name: 'Low and long' })).toBeVisible()
  await lookOver(page)
  await page.getByRole('button', { name: /^Wren Hollis, not yet marked/ }).click()
  await expect(page.getByText('Wren is marked present')).toBeVisible()
  await page.getByRole('button', { name: 'Undo' }).click()
  await page.getByRole('button', { name: 'Other marks for Wren Hollis' }).click()
  await page.getByRole('button', { name: 'Late' }).click()
  await lookOver(page)
  await page.getByRole('button', { name: 'Close register, 1 of 1 marked' }).click()
  await expect(page.getByRole('button', { name: 'Open the register again' })).toBeVisible()
  await product.drain()
}

async function seeMoney(page: Page, product: Product, { slug }: { slug: string }) {
  await page.clock.setSystemTime(FIRST_SESSION)
  await page.goto(`/${slug}/desk/money`)
  // 120.00 with 9 % VAT in it is 110.09 net; the first of eight sessions earns 13.77 of it.
  await expect(page.getByRole('button', { name: /^Taken in 2031: €120.00/ })).toBeVisible()
  await expect(page.getByText('€96.32')).toBeVisible()
  await lookOver(page)
  await page.getByRole('button', { name: /^Taken in 2031/ }).click()
  await expect(page.getByRole('button', { name: /Close/ })).toBeVisible()
  await lookOver(page)
}

async function giveBack(page: Page, product: Product, { slug }: { slug: string }) {
  await page.goto(`/${slug}/desk/golfers`)
  await page.getByRole('link', { name: 'Wren Hollis' }).click()
  await page.getByRole('button', { name: 'Give up' }).click()
  await lookOver(page)
  await page.getByRole('button', { name: 'Give it up' }).click()
  await expect(page.getByText(/comes back/)).toBeHidden()
  await product.drain()
  await page.goto(`/${slug}/desk/money`)
  // The seven sessions ahead, of eight that are worth 15.00 each.
  await expect(page.getByRole('button', { name: /^Refunded in 2031: €105.00/ })).toBeVisible()
  await lookOver(page)
}
