import { cautions, cautionSources } from '#shared/settings/cautions'
import { formatExact } from '#shared/units/exact-time'

/** One axis as the index page has it. */
export interface FolderAxis {
  readonly tag: string
  readonly role: string
  readonly machine: string
  readonly unit: string
  readonly knownGood: string
  readonly code: string
  readonly files: readonly { readonly path: string, readonly words: string }[]
  /** What has to be known before anything is written; '' where nothing has. */
  readonly note: string
}

export interface FolderWords { readonly plant: string, readonly site: string, readonly line: string, readonly timeZone: string, readonly madeAt: string, readonly axes: readonly FolderAxis[] }

const signs: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', '\'': '&#39;' }
const plain = (text: string) => text.replaceAll(/[&<>"']/g, sign => signs[sign] ?? sign)

const style = `
body { font: 15px/1.5 Inter, system-ui, sans-serif; color: #141d29; background: #fbfaf7; margin: 24px auto; max-width: 1200px; padding: 0 16px; }
h1 { font-size: 28px; line-height: 1.2; margin: 0; } h2 { font-size: 15px; margin: 24px 0 4px; border-top: 1px solid #7b7972; padding-top: 8px; }
table { border-collapse: collapse; width: 100%; } th, td { text-align: left; vertical-align: top; padding: 6px 12px 6px 0; border-bottom: 1px solid #d8d4c8; } thead th { font-weight: 400; color: #4b5460; }
.m { font-family: "JetBrains Mono", ui-monospace, monospace; font-size: 13.5px; } tbody th { font-weight: 600; } a { color: #1b3a6b; } li { margin: 2px 0; } .note { color: #b3261e; }
@media (max-width: 760px) { table, tbody, tr, td, tbody th { display: block; border: 0; } thead { display: none; } tr { border-bottom: 1px solid #7b7972; padding: 8px 0; } td:empty { display: none; } }
@media print { body { background: #fff; margin: 0; } }`

/** The page that opens a line folder: whole by itself, without the product, a network or a script. */
export function indexPage({ plant, site, line, timeZone, madeAt, axes }: FolderWords): string {
  const rows = axes.map(({ tag, role, machine, unit, knownGood, code, files, note }) => `<tr>
<th scope="row" class="m">${plain(tag)}</th><td>${plain([role, machine].filter(Boolean).join(', '))}</td><td class="m">${plain(unit)}</td><td>${plain(knownGood)}</td><td class="m">${plain(code)}</td>
<td>${note === '' ? '' : `<span class="note">${plain(note)}</span> `}${files.map(file => `<a href="${plain(file.path.split('/').map(encodeURIComponent).join('/'))}">${plain(file.words)}</a>`).join('<br>')}</td></tr>`)
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${plain(`${line}, line folder`)}</title><style>${style}</style></head>
<body><main>
<h1>${plain(line)}: what every axis is restored to</h1>
<p>${plain([plant, site].filter(Boolean).join(', '))}. Made <b>${plain(formatExact(madeAt, timeZone))}</b>, for when the vault cannot be reached. What was changed since is not in here.</p>
<h2>Before a value is written</h2>
<ol>${cautions.map(caution => `<li>${plain(caution)}</li>`).join('')}</ol><p>${plain(cautionSources)}</p>
<h2>${axes.length} ${axes.length === 1 ? 'axis' : 'axes'}</h2>
<table><thead><tr><th scope="col">Tag</th><th scope="col">What it does</th><th scope="col">Unit fitted</th><th scope="col">Known-good</th><th scope="col">Code of its sheet</th><th scope="col">Files</th></tr></thead>
<tbody>
${rows.join('\n')}
</tbody></table>
</main></body></html>
`
}
