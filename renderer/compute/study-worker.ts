import './no-eval.ts'
import { assertNever } from '../../core/errors.ts'
import { evaluate } from '../../core/evaluate.ts'
import { dampingNeed } from '../../core/feasibility/damping-need.ts'
import { withDuration } from './with-duration.ts'
import type { DurationStudy, StudyReply, StudyRequest } from './study-messages.ts'

/** The curves against speed play no part here. */
const FEW_SPEEDS = 2

self.onmessage = (event: MessageEvent<StudyRequest>) => {
  try {
    answer(event.data)
    say({ kind: 'end' })
  } catch (error) {
    say({ kind: 'failure', message: error instanceof Error ? error.message : String(error) })
  }
}

function answer(request: StudyRequest): void {
  switch (request.kind) {
    case 'durations':
      return answerDurations(request)
    case 'damping':
      return say({
        kind: 'damping',
        ...dampingNeed(request.project, request.clearance, request.absorbers),
      })
    default:
      return assertNever(request, 'request')
  }
}

function answerDurations({ project, factors }: DurationStudy): void {
  // without requirements there is nothing to judge and no lever to try
  const bare = { ...project, requirements: [] }
  for (const factor of factors) {
    const { runUp } = evaluate(withDuration(bare, factor), { sweepPoints: FEW_SPEEDS })
    if (runUp) say({ kind: 'duration', factor, runUp })
  }
}

function say(reply: StudyReply): void {
  self.postMessage(reply)
}
