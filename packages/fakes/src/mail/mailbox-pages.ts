import { escapeHtml, page } from '../page'
import type { Fate, KeptMail } from './message'

const FATES: Readonly<Record<Fate, string>> = {
  delivered: 'delivered',
  bounce: 'came back: there is no such mailbox',
  dropped: 'not sent on',
  spamreport: 'delivered, and reported as spam',
}
const NOTE =
  '<p class="note">The local stand-in of the mail provider. Nothing leaves this machine.</p>'

/** The mailbox: everything that was sent, newest first. */
export function mailboxPage(messages: readonly KeptMail[], to: string): string {
  const rows = messages.map(({ id, at, to: address, subject }) => {
    const when = escapeHtml(at.slice(0, 16).replace('T', ' '))
    const link = `<a href="/messages/${id}">${escapeHtml(subject)}</a>`
    return `<tr><td>${when}</td><td>${escapeHtml(address)}</td><td>${link}</td></tr>`
  })
  return page(
    'Mail that was sent',
    `<h1>Mail that was sent</h1>${NOTE}
     <form><label for="to">To</label><input id="to" name="to" value="${escapeHtml(to)}">
     <p><button>Show</button></p></form>
     <table><thead><tr><th>When (UTC)</th><th>To</th><th>Subject</th></tr></thead>
     <tbody>${rows.join('')}</tbody></table>`,
  )
}

/** One message: as a mail program shows it, as text, and its calendar part. */
export function messagePage(message: KeptMail): string {
  const { id, to, subject, fromName, fromEmail, html, text, fate, attachments } = message
  const parts = attachments.map(({ filename, type, content }, index) => {
    const read = Buffer.from(content, 'base64').toString('utf8')
    const link = `<a href="/messages/${id}/attachments/${index}">Download</a>`
    return `<h2>${escapeHtml(filename)}</h2><p>${link}, ${escapeHtml(type)}</p>
      <pre>${escapeHtml(read)}</pre>`
  })
  // Links of the letter open beside it: the frame itself may not leave for elsewhere.
  const framed = escapeHtml(html.replace('<head>', '<head><base target="_blank">'))
  return page(
    subject,
    `<p><a href="/">All mail</a></p><h1>${escapeHtml(subject)}</h1>
     <table><tr><th>From</th><td>${escapeHtml(`${fromName} <${fromEmail}>`)}</td></tr>
     <tr><th>To</th><td>${escapeHtml(to)}</td></tr>
     <tr><th>What became of it</th><td>${FATES[fate]}</td></tr></table>
     <h2>As it looks</h2>
     <iframe title="The message" sandbox="allow-popups" srcdoc="${framed}"></iframe>
     <h2>As text</h2><pre>${linked(text)}</pre>${parts.join('')}`,
  )
}

function linked(text: string): string {
  return escapeHtml(text).replace(/https?:\/\/[^\s<]+/g, (url) => `<a href="${url}">${url}</a>`)
}
