import './no-eval.ts'
import { evaluate } from '../../core/evaluate.ts'
import type { ComputeReply, ComputeRequest } from './messages.ts'

self.onmessage = (event: MessageEvent<ComputeRequest>) => {
  const { id, project } = event.data
  self.postMessage(reply(id, project))
}

function reply(id: number, project: ComputeRequest['project']): ComputeReply {
  try {
    return { id, evaluation: evaluate(project) }
  } catch (error) {
    const known = error instanceof Error
    return {
      id,
      failure: { message: known ? error.message : String(error), stack: known ? (error.stack ?? '') : '' },
    }
  }
}
