/** A mail as text and as HTML, from the same parts: what one says, the other says. */

export type Part =
  | { kind: 'text'; text: string }
  | { kind: 'heading'; text: string }
  | { kind: 'rows'; rows: readonly (readonly [label: string, value: string])[]; total?: readonly [string, string] }
  | { kind: 'link'; text: string; url: string }
  | { kind: 'caution'; text: string }

const escaped = (text: string) =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;')

function textOf(part: Part): string {
  switch (part.kind) {
    case 'heading':
      return part.text.toUpperCase()
    case 'rows':
      return [...part.rows, ...(part.total ? [part.total] : [])]
        .map(([label, value]) => `${label}: ${value}`)
        .join('\n')
    case 'link':
      return `${part.text}:\n${part.url}`
    default:
      return part.text
  }
}

const cell = 'padding:6px 0;border-bottom:1px solid #d6cfbf;font-size:16px'

function htmlOf(part: Part): string {
  switch (part.kind) {
    case 'heading':
      return `<h2 style="margin:28px 0 8px;font-size:18px">${escaped(part.text)}</h2>`
    case 'rows': {
      const row = ([label, value]: readonly [string, string], bold = false) =>
        `<tr><th scope="row" style="${cell};text-align:start;font-weight:${bold ? 700 : 400}">${escaped(label)}</th><td style="${cell};text-align:end;font-weight:${bold ? 700 : 600}">${escaped(value)}</td></tr>`
      return `<table style="width:100%;border-collapse:collapse;border-top:1px solid #1d2226">${part.rows.map((one) => row(one)).join('')}${part.total ? row(part.total, true) : ''}</table>`
    }
    case 'link':
      return `<p style="margin:24px 0"><a href="${escaped(part.url)}" style="display:inline-block;background:#1d2226;color:#fbf9f4;padding:14px 22px;font-weight:650;text-decoration:none">${escaped(part.text)}</a></p>`
    case 'caution':
      return `<p style="margin:20px 0;border-inline-start:3px solid #8a5d10;background:#f3e6c9;color:#1d2226;padding:11px 14px">${escaped(part.text)}</p>`
    default:
      return `<p style="margin:14px 0">${escaped(part.text)}</p>`
  }
}

export function renderMail(language: string, subject: string, parts: readonly Part[], foot: string) {
  const text = [...parts.map(textOf), foot].join('\n\n')
  const html = `<!doctype html><html lang="${language}"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escaped(subject)}</title></head>
<body style="margin:0;background:#efebe1;color:#1d2226;font:400 16px/1.5 Manrope,system-ui,sans-serif">
<table role="presentation" style="width:100%;border-collapse:collapse"><tr><td style="padding:20px 10px">
<table role="presentation" style="width:100%;max-width:600px;margin:0 auto;background:#fbf9f4;border:1px solid #a89f8c;border-collapse:collapse"><tr><td style="padding:26px 28px">
<p style="margin:0 0 20px;font-size:20px;font-weight:800;letter-spacing:-.02em">Felloe</p>
<h1 style="margin:0 0 12px;font-size:24px;line-height:1.2">${escaped(subject)}</h1>
${parts.map(htmlOf).join('\n')}
<p style="margin:28px 0 0;padding-top:12px;border-top:1px solid #d6cfbf;font-size:14px;color:#545e65">${escaped(foot)}</p>
</td></tr></table></td></tr></table></body></html>`
  return { subject, text, html }
}
