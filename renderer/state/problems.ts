import type { Evaluation, Problem } from '../../core/results.ts'

const NONE: readonly Problem[] = []
const indexes = new WeakMap<Evaluation, ReadonlyMap<string, readonly Problem[]>>()

/** What the computation says about these fields of the project. */
export function problemsAt(
  evaluation: Evaluation | null,
  field: string | readonly string[] | undefined,
): readonly Problem[] {
  if (evaluation === null || field === undefined) return NONE
  const index = indexes.get(evaluation) ?? buildIndex(evaluation)
  if (typeof field === 'string') return index.get(field) ?? NONE
  return field.flatMap((name) => index.get(name) ?? NONE)
}

function buildIndex(evaluation: Evaluation): ReadonlyMap<string, readonly Problem[]> {
  const index = new Map<string, Problem[]>()
  // a designed mount type that stands under no mount yet has its remarks with the component alone
  for (const problem of [...evaluation.problems, ...evaluation.components.flatMap((item) => item.problems)]) {
    const list = index.get(problem.field) ?? []
    if (!list.some(({ message }) => message === problem.message)) index.set(problem.field, [...list, problem])
  }
  indexes.set(evaluation, index)
  return index
}
