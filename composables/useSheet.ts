import type { z } from 'zod'
import { conflicts, onTop } from '~/utils/forms/conflict'
import { bodyOf, draftOf, editedBody, type Body, type Draft, type FormField } from '~/utils/forms/fields'
import { issuesOf, issuesOfProblem, type Issues } from '~/utils/forms/issues'

export interface SheetOptions<Answer> {
  readonly fields: () => readonly FormField[]
  readonly schema: () => z.ZodType
  /** What is edited; absent = something new is made. */
  readonly record: () => Readonly<Body> | undefined
  /** What stands in the vault now, as `record` has it; needed where its answer is not as flat as the form. */
  readonly flat?: () => ((current: unknown) => Body) | undefined
  /** What a new one begins with. */
  readonly start?: () => Readonly<Body> | undefined
  /** Goes along with what stands in the fields: ids of the place, the step. */
  readonly fixed: () => Readonly<Body>
  /** Makes the body that the schema knows of fields that stand flat in the form. */
  readonly shape?: () => ((body: Body, draft: Draft) => Body) | undefined
  readonly send: (body: Body) => Promise<Answer>
}

/** The state of one form: its draft, what is wrong where, and what somebody else changed meanwhile. */
export function useSheet<Answer>(options: SheetOptions<Answer>) {
  const before = shallowRef<Draft>(draftOf(options.fields(), options.record() ?? options.start?.()))
  const draft = ref<Draft>({ ...before.value })
  const issues = shallowRef<Issues>({})
  const problem = shallowRef<ApiProblem>()
  const theirs = shallowRef<Body>()
  /** What the vault holds now, as it answered. */
  const current = shallowRef<unknown>()
  const rev = ref(options.record()?.rev)
  const busy = ref(false)

  const met = computed(() => theirs.value ? conflicts(options.fields(), before.value, draft.value, theirs.value) : [])
  const edited = computed(() => JSON.stringify(before.value) !== JSON.stringify(draft.value))

  function body(): Body {
    const plain = options.record() ? { ...editedBody(options.fields(), before.value, draft.value), rev: rev.value } : { ...bodyOf(options.fields(), draft.value), ...options.fixed() }
    return options.shape?.()?.(plain, draft.value) ?? plain
  }

  function failed(failure: unknown): void {
    const found = toProblem(failure)
    const { code, current: now } = found.problem
    if (code === 'edited-meanwhile' && now !== null && typeof now === 'object') {
      current.value = now
      theirs.value = options.flat?.()?.(now) ?? now as Body
      return
    }
    const names = options.fields().map(field => field.name)
    const placed = issuesOfProblem(found.problem, names)
    const atField = names.some(name => placed[name])
    issues.value = atField ? { '': found.problem.detail, ...placed } : placed
    problem.value = atField ? undefined : found
  }

  /** Answers what the vault answered, or undefined where the form needs another look. */
  async function submit(): Promise<Answer | undefined> {
    problem.value = undefined
    const candidate = body()
    const parsed = options.schema().safeParse(candidate, { reportInput: true })
    issues.value = parsed.success ? {} : issuesOf(parsed.error)
    if (!parsed.success) return undefined
    busy.value = true
    try {
      return await options.send(candidate)
    }
    catch (failure) {
      failed(failure)
      return undefined
    }
    finally {
      busy.value = false
    }
  }

  /** Goes on from what stands in the vault now: with what was written here on top, or without it. */
  function settle(keepMine: boolean): void {
    const now = theirs.value
    if (!now) return
    const mine = keepMine ? onTop(options.fields(), before.value, draft.value, now) : draftOf(options.fields(), now)
    before.value = draftOf(options.fields(), now)
    draft.value = { ...mine }
    rev.value = now.rev
    theirs.value = undefined
  }

  return { draft, issues, problem, busy, met, theirs, current, edited, submit, settle }
}
