import { escapeHtml, page } from '../page'
import type { Fate, KeptMail } from './message'

const FATES: Readonly<Record<Fate, string>> = {
  delivered: 'delivered',
  bounce: 'came back: there is no such mailbox',
  dropped: 'not sent on',
  spamreport: 'delivered, and reported as spam',
}

/** The mailbox: everything that was sent, newest first. */
export function mailboxPage(messages: readonly KeptMail[], to: string): string {
  const rows = messages
    .map(
      (message) =>
        `<tr><td>${escapeHtml(message.at.slice(0, 16).replace('T', ' '))}</td><td>${escapeHtml(message.to)}</td>` +
        `<td><a href="/messages/${message.id}">${escapeHtml(message.subject)}</a></td></tr>`,
    )
    .join('')
  return page(
    'Mail that was sent',
    `<h1>Mail that was sent</h1><p class="note">The local stand-in of the mail provider. Nothing leaves this machine.</p>
     <form><label for="to">To</label><input id="to" name="to" value="${escapeHtml(to)}"><p><button>Show</button></p></form>
     <table><thead><tr><th>When (UTC)</th><th>To</th><th>Subject</th></tr></thead><tbody>${rows}</tbody></table>`,
  )
}

/** One message: as a mail program shows it, as text, and its calendar part. */
export function messagePage(message: KeptMail): string {
  const parts = message.attachments
    .map((part, index) => {
      const text = Buffer.from(part.content, 'base64').toString('utf8')
      return `<h2>${escapeHtml(part.filename)}</h2><p><a href="/messages/${message.id}/attachments/${index}">Download</a>,
        ${escapeHtml(part.type)}</p><pre>${escapeHtml(text)}</pre>`
    })
    .join('')
  return page(
    message.subject,
    `<p><a href="/">All mail</a></p><h1>${escapeHtml(message.subject)}</h1>
     <table><tr><th>From</th><td>${escapeHtml(`${message.fromName} <${message.fromEmail}>`)}</td></tr>
     <tr><th>To</th><td>${escapeHtml(message.to)}</td></tr>
     <tr><th>What became of it</th><td>${FATES[message.fate]}</td></tr></table>
     <h2>As it looks</h2><iframe title="The message" sandbox="allow-popups" srcdoc="${escapeHtml(message.html.replace('<head>', '<head><base target="_blank">'))}"></iframe>
     <h2>As text</h2><pre>${linked(message.text)}</pre>${parts}`,
  )
}

function linked(text: string): string {
  return escapeHtml(text).replace(/https?:\/\/[^\s<]+/g, (url) => `<a href="${url}">${url}</a>`)
}
