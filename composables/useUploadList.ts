import type { JudgingContext } from '#shared/api/uploads'
import type { ReadSettings } from '#shared/settings/types'
import { bytesInWords, mostBytesOfAll, mostBytesOfFile, mostFiles } from '~/utils/upload/limits'
import type { ListedFile, Reading } from '~/utils/upload/model'
import { examine, placeAxis, type Examined } from '~/utils/upload/place'
import { readFile } from '~/utils/upload/read-file'
import { runQueue } from '~/utils/upload/queue'
import { isZip, unpack, type NamedBytes } from '~/utils/upload/unpack'

const contextsAtOnce = 6
const showEvery = 100
let lastId = 0

const sameBytes = (a: Uint8Array, b: Uint8Array) => a.length === b.length && a.every((byte, index) => byte === b[index])

/** Takes files into the list and reads each one here, against what the vault says to its serial. Nothing is sent. */
export function useUploadList() {
  const store = useUploads()
  const api = useApi()
  const contexts = new Map<string, Promise<JudgingContext>>()
  const examined = new Map<number, Examined>()

  function contextFor({ unit, exportedAt }: ReadSettings['file']): Promise<JudgingContext> {
    const query = { serial: unit.serial, channel: unit.channel, capturedAt: exportedAt }
    const key = JSON.stringify(query)
    const known = contexts.get(key)
    if (known) return known
    const asked = api.get<JudgingContext>('/api/judging-context', { query })
    contexts.set(key, asked)
    return asked
  }

  const readings = new Map<number, Reading>()
  const axesToPlace = new Set<number>()
  let due = false

  /** All files of these axes again: one more or less in the list changes what the others are compared with. */
  function flush(): void {
    due = false
    const listed = new Set(store.files.map(file => file.id))
    for (const axisId of axesToPlace) {
      const ofAxis = [...examined.values()].filter(one => one.context.axis?.id === axisId && listed.has(one.id))
      for (const [id, reading] of placeAxis(ofAxis, store.words.occasion)) readings.set(id, reading)
    }
    store.setReadings(readings)
    readings.clear()
    axesToPlace.clear()
  }

  /** Many files are read in a moment: the page is told ten times a second, not once a file. */
  function soon(): void {
    if (due) return
    due = true
    window.setTimeout(flush, showEvery)
  }
  function show(id: number, reading: Reading): void {
    readings.set(id, reading)
    soon()
  }
  function placeAgain(axisId: number): void {
    axesToPlace.add(axisId)
    soon()
  }

  async function readOne(file: ListedFile): Promise<void> {
    const read = readFile(file)
    if ('state' in read) return show(file.id, read)
    try {
      const context = await contextFor(read.file)
      const reading = examine(file.id, file.name, read, context, new Date())
      if ('state' in reading) return show(file.id, reading)
      examined.set(file.id, reading)
      if (context.axis) placeAgain(context.axis.id)
    }
    catch (failure) {
      contexts.clear()
      show(file.id, { state: 'unjudged', read, why: toProblem(failure).problem.detail })
    }
  }

  async function readAll(files: readonly ListedFile[]): Promise<void> {
    await runQueue(files.filter(file => file.reading.state !== 'twin'), contextsAtOnce, readOne)
    flush()
  }

  async function bytesOf(picked: readonly File[]): Promise<NamedBytes[]> {
    const out: NamedBytes[] = []
    for (const file of picked) {
      if (file.size > mostBytesOfAll) {
        store.left = [...store.left, { name: file.name, why: `larger than ${bytesInWords(mostBytesOfAll)}` }]
        continue
      }
      const bytes = new Uint8Array(await file.arrayBuffer())
      if (!isZip(bytes)) {
        out.push({ name: file.name, bytes })
        continue
      }
      const { files, left } = unpack(bytes, { files: mostFiles, bytes: mostBytesOfAll })
      out.push(...files)
      store.left = [...store.left, ...left]
    }
    return out
  }

  function refusal({ bytes }: NamedBytes, held: readonly ListedFile[]): string | undefined {
    if (held.length >= mostFiles) return `beyond ${mostFiles} files`
    if (bytes.length > mostBytesOfFile) return `larger than ${bytesInWords(mostBytesOfFile)}`
    const total = held.reduce((sum, file) => sum + file.bytes.length, bytes.length)
    return total > mostBytesOfAll ? `beyond ${bytesInWords(mostBytesOfAll)} in all` : undefined
  }

  async function add(picked: readonly File[]): Promise<void> {
    const fresh: ListedFile[] = []
    for (const one of await bytesOf(picked)) {
      const held = [...store.files, ...fresh]
      const why = refusal(one, held)
      if (why) {
        store.left = [...store.left, { name: one.name, why }]
        continue
      }
      const twin = held.find(file => file.reading.state !== 'twin' && sameBytes(file.bytes, one.bytes))
      fresh.push({ id: lastId += 1, ...one, reading: twin ? { state: 'twin', of: twin.name } : { state: 'waits' } })
    }
    store.files = [...store.files, ...fresh]
    await readAll(fresh)
  }

  function leaveOut(id: number): void {
    const gone = store.files.find(file => file.id === id)
    store.files = store.files.filter(file => file.id !== id)
    const axisId = examined.get(id)?.context.axis?.id
    examined.delete(id)
    if (axisId !== undefined) placeAgain(axisId)
    const twin = gone && store.files.find(file => file.reading.state === 'twin' && sameBytes(file.bytes, gone.bytes))
    if (twin) void readAgain(twin.id)
  }

  /** Reads a file anew: with the answer to its decimal sign or its layout, or because there was no reception before. */
  async function readAgain(id: number, said: Pick<ListedFile, 'decimal' | 'layout'> = {}): Promise<void> {
    store.files = store.files.map(file => file.id === id ? { ...file, ...said, reading: { state: 'waits' } } : file)
    await readAll(store.files.filter(file => file.id === id))
  }

  /** The mended file takes the place of the one that could not be read. */
  async function replace(id: number, picked: File): Promise<void> {
    store.files = store.files.filter(file => file.id !== id)
    await add([picked])
  }

  watch(() => store.words.occasion, () => {
    for (const axisId of new Set([...examined.values()].map(one => one.context.axis?.id))) if (axisId !== undefined) placeAgain(axisId)
  })
  onMounted(() => readAll(store.files.filter(file => !store.sendings.get(file.id)?.outcome)))

  return { add, leaveOut, readAgain, replace }
}
