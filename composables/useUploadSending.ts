import { formOf } from '#shared/settings/read'
import { fieldsFor, type NamedPerson } from '~/utils/upload/fields'
import type { ListedFile } from '~/utils/upload/model'
import { isKept, outcomeOf, refusedOutcome, type Outcome } from '~/utils/upload/outcome'
import { runQueue } from '~/utils/upload/queue'
import type { Sent } from '~/utils/upload/receipt'

const atOnce = 4
const types = { json: 'application/json', csv: 'text/csv' }

/** Files of one axis go one after another, oldest first, so that none arrives late because of another. */
function inLanes(files: readonly ListedFile[]): ListedFile[][] {
  const lanes = new Map<string, ListedFile[]>()
  for (const file of files) {
    const lane = file.reading.state === 'placed' ? `axis ${file.reading.axis.id}` : `file ${file.id}`
    lanes.set(lane, [...lanes.get(lane) ?? [], file])
  }
  const at = (file: ListedFile) => file.reading.state === 'placed' ? Date.parse(file.reading.read.file.exportedAt) : 0
  return [...lanes.values()].map(lane => lane.sort((a, b) => at(a) - at(b)))
}

/** Sends the list, four at a time; every file is stored by itself, and what was refused can be sent again. */
export function useUploadSending(people: () => readonly NamedPerson[]) {
  const store = useUploads()
  const api = useApi()

  const wanted = computed(() => store.files.filter(file => file.reading.state !== 'twin'))
  const open = computed(() => wanted.value.filter((file) => {
    const outcome = store.sendings.get(file.id)?.outcome
    return !outcome || !isKept(outcome)
  }))
  const kept = computed(() => wanted.value.length - open.value.length)
  const going = computed(() => wanted.value.filter(file => store.sendings.get(file.id)?.step === 'going'))
  const failed = computed(() => open.value.filter(file => store.sendings.get(file.id)?.outcome?.kind === 'refused'))
  const sent = computed<Sent[]>(() => wanted.value.flatMap(({ id, name, reading }) => {
    const outcome = store.sendings.get(id)?.outcome
    return outcome ? [{ name, outcome, forecast: reading.state === 'placed' ? reading.number : null }] : []
  }))

  async function attempt(file: ListedFile, key: string, query: ReturnType<typeof fieldsFor>): Promise<Outcome> {
    try {
      return outcomeOf(await api.post('/api/uploads', file.bytes, { query, key, headers: { 'content-type': types[file.layout ? 'csv' : formOf(file.bytes)] } }))
    }
    catch (failure) {
      return refusedOutcome(toProblem(failure).problem)
    }
  }

  async function sendOne(file: ListedFile): Promise<void> {
    const query = fieldsFor(file, store.words, people(), wanted.value.length)
    const words = JSON.stringify(query)
    const before = store.sendings.get(file.id)
    const key = before?.words === words ? before.key : newRequestKey()
    store.setSending(file.id, { step: 'going', key, words, outcome: null })
    store.setSending(file.id, { step: 'done', key, words, outcome: await attempt(file, key, query) })
  }

  async function send(files: readonly ListedFile[] = open.value): Promise<void> {
    if (store.sending) return
    store.startedAt = Date.now()
    store.endedAt = undefined
    for (const file of files) {
      const before = store.sendings.get(file.id)
      store.setSending(file.id, { step: 'waits', key: before?.key ?? newRequestKey(), words: before?.words ?? '', outcome: null })
    }
    const signedOut = () => [...store.sendings.values()].some(({ outcome }) => outcome?.kind === 'refused' && outcome.status === 401)
    await runQueue(inLanes(files), atOnce, async lane => runQueue(lane, 1, sendOne), signedOut)
    store.endedAt = Date.now()
  }

  return { wanted, open, kept, going, failed, sent, send }
}
