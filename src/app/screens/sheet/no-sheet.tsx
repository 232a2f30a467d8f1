import type { Finding } from '../../../sheets/content/lint.ts'
import type { Refusal } from '../../../sheets/content/tree.ts'

/** Why there is no sheet, or none in this form, and what would change that. */
export function NoSheet({ refusal, title }: { refusal: Refusal; title: string }) {
  return (
    <section class="stack" aria-labelledby="none">
      <h2 id="none">{title}</h2>
      <p>{sentence(refusal.why)}</p>
      {refusal.missing.length > 0 && (
        <>
          <p>Missing:</p>
          <ul class="plain-list">
            {refusal.missing.map((one) => (
              <li key={one}>{one}</li>
            ))}
          </ul>
        </>
      )}
      <p>{sentence(refusal.whatToDo)}</p>
    </section>
  )
}

/** Words of a sheet that its reader cannot use, each with what to write instead. */
export function Findings({ findings }: { findings: readonly Finding[] }) {
  return (
    <ul class="plain-list">
      {findings.map((finding) => (
        <li key={`${finding.where} ${finding.text} ${finding.problem}`}>
          {finding.where}: “{finding.text}”: {finding.problem}. {finding.whatToDo}
        </li>
      ))}
    </ul>
  )
}

function sentence(text: string): string {
  const begun = text.charAt(0).toUpperCase() + text.slice(1)
  return /[.!?]$/.test(begun) ? begun : `${begun}.`
}
