import { parseArgs } from 'node:util'
import { buildFleet } from './build'
import { folderOf, wholeFleet } from './size'

const { values } = parseArgs({ options: { axes: { type: 'string' }, versions: { type: 'string' }, folder: { type: 'string' }, fresh: { type: 'boolean' } } })
const size = { ...wholeFleet, ...(values.axes ? { axes: Number(values.axes) } : {}), ...(values.versions ? { versions: Number(values.versions) } : {}) }
const folder = values.folder ?? folderOf(size)
await buildFleet(folder, size, values.fresh === true, line => console.log(line))
