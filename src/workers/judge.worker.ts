import type { FromJudge, ToJudge } from './messages.ts'

addEventListener('message', ({ data }: MessageEvent<ToJudge>) => {
  if (data.kind === 'judge')
    tell({ kind: 'problem', question: data.question, problem: 'The judgement is not built in yet.' })
})

function tell(message: FromJudge) {
  postMessage(message)
}
