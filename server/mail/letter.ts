/**
 * A letter, written once: both its plain text and its HTML are made of the same blocks. It carries no picture, no
 * foreign address and nothing that tells whether it was read.
 */

/** Stand for what only the sender of a letter knows; never in what people typed, since control characters are taken out of it. */
const ORIGIN = '\u0001'
const SECRET = '\u0002'

export type Block =
  | { say: string }
  | { facts: readonly (readonly [name: string, value: string])[] }
  /** A path of this server, beginning with a slash; `secret` is put behind it. */
  | { go: string; to: string; secret?: boolean }

export interface Letter {
  subject: string
  blocks: readonly Block[]
  /** Why it came to this person, and what to do when it should not have. */
  why: string
}

export interface Written {
  subject: string
  text: string
  html: string
}

/** One line without control characters: nothing that was typed can begin another header or block. */
function plain(text: string): string {
  return text
    .replace(/[\p{Cc}\p{Cf}]+/gu, ' ')
    .replace(/ {2,}/g, ' ')
    .trim()
}

function escaped(text: string): string {
  return plain(text).replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`)
}

const addressOf = ({ to, secret = false }: { to: string; secret?: boolean }): string => `${ORIGIN}${plain(to)}${secret ? `/${SECRET}` : ''}`

function blockText(block: Block): string {
  if ('say' in block) return plain(block.say)
  if ('facts' in block) return block.facts.map(([name, value]) => `${plain(name)}: ${plain(value)}`).join('\n')
  return `${plain(block.go)}:\n${addressOf(block)}`
}

const FONT = "font-family:'IBM Plex Sans',Arial,Helvetica,sans-serif"

function blockHtml(block: Block): string {
  if ('say' in block) return `<p style="margin:0 0 16px">${escaped(block.say)}</p>`
  if ('facts' in block) {
    const rows = block.facts.map(
      ([name, value]) =>
        `<p style="margin:0;padding:8px 0;border-top:1px solid #A9B5C0"><span style="display:block;font-size:14px;color:#364459">${escaped(name)}</span><span style="overflow-wrap:anywhere;font-weight:600">${escaped(value)}</span></p>`,
    )
    return `<div style="margin:0 0 20px;border-bottom:1px solid #A9B5C0">${rows.join('')}</div>`
  }
  const address = addressOf(block)
  return (
    `<p style="margin:0 0 8px"><a href="${address}" style="display:inline-block;padding:16px 20px;background:#142A66;color:#F2F6FC;font-weight:600;text-decoration:none">${escaped(block.go)}</a></p>` +
    `<p style="margin:0 0 20px;font-size:14px;color:#364459;overflow-wrap:anywhere">${address}</p>`
  )
}

/** The letter as it is kept: the server's address and the secret are put in when it is sent. */
export function writeLetter({ subject, blocks, why }: Letter): Written {
  const line = plain(subject).slice(0, 160)
  const text = `${[...blocks.map(blockText), `—\n${plain(why)}`].join('\n\n')}\n`
  const html =
    `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${escaped(line)}</title></head>` +
    `<body style="margin:0;padding:0;background:#E7ECEF"><div style="max-width:560px;margin:0 auto;padding:20px 16px;background:#F8FAFA;color:#0B1733;font-size:16px;line-height:1.45;${FONT}">` +
    `<p style="margin:0 0 16px;padding:0 0 12px;border-bottom:2px solid #142A66;font-weight:600">Quarterload</p>` +
    `<h1 style="margin:0 0 16px;font-size:22px;line-height:1.25">${escaped(line)}</h1>${blocks.map(blockHtml).join('')}` +
    `<p style="margin:24px 0 0;padding:12px 0 0;border-top:1px solid #A9B5C0;font-size:14px;color:#364459">${escaped(why)}</p>` +
    `</div></body></html>`
  return { subject: line, text, html }
}

/** Where a letter's links lead, and the secret that one of them carries; null leaves it out and says so. */
export interface Filling {
  origin: string
  secret: string | null
}

export function fillIn(text: string, { origin, secret }: Filling): string {
  return text.replaceAll(ORIGIN, origin).replaceAll(SECRET, secret ?? '(only in the letter that was sent)')
}
