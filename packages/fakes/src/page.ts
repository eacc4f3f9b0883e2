/** The plain page that every stand-in shows: readable, narrow or wide, by day and by night. */
export function page(title: string, body: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title><style>
:root{color-scheme:light dark}
body{margin:0;font:17px/1.5 system-ui,sans-serif;background:Canvas;color:CanvasText}
main{max-width:44rem;margin:0 auto;padding:1.5rem 1rem 3rem}
h1{font-size:1.5rem;line-height:1.25;margin:.5rem 0 1rem}
label{display:block;font-weight:600;margin:.9rem 0 .25rem}
input{width:100%;box-sizing:border-box;min-height:3rem;padding:.4rem .7rem;font:inherit}
button,.button{display:inline-block;min-height:3rem;padding:.5rem 1.2rem;font:inherit}
button,.button{font-weight:600;cursor:pointer}
table{border-collapse:collapse;width:100%}
td,th{text-align:left;padding:.4rem .6rem .4rem 0;vertical-align:top}
td,th{border-bottom:1px solid GrayText}
.note{font-size:.9375rem}.wrong{font-weight:600;border-left:6px solid;padding-left:.75rem}
iframe{width:100%;min-height:34rem;border:1px solid GrayText;background:#fff}
pre{white-space:pre-wrap;overflow-wrap:anywhere}
</style></head><body><main>${body}</main></body></html>`
}

export function escapeHtml(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
}
