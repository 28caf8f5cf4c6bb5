import './no-eval.ts'
import { evaluate } from '../../core/evaluate.ts'
import { withDuration } from './with-duration.ts'
import type { StudyReply, StudyRequest } from './study-messages.ts'

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
  // without requirements there is nothing to judge and no lever to try
  const bare = { ...request.project, requirements: [] }
  for (const factor of request.factors) {
    const { runUp } = evaluate(withDuration(bare, factor), { sweepPoints: FEW_SPEEDS })
    if (runUp) say({ kind: 'duration', factor, runUp })
  }
}

function say(reply: StudyReply): void {
  self.postMessage(reply)
}
