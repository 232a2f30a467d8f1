import type { Problem } from '../../record/file/index.ts'

/** What is wrong with a file: where, what was expected, what stood there, what to do. */
export function Problems(props: { title: string; problems: readonly Problem[] }) {
  if (props.problems.length === 0) return null
  return (
    <div class="trouble" role="alert">
      <p>{props.title}</p>
      <ul class="stack">
        {props.problems.slice(0, 5).map((problem) => (
          <li key={`${problem.path} ${problem.found}`}>
            {problem.path ? `At ${problem.path}: ` : ''}expected {problem.expected}, found {problem.found}.{' '}
            {problem.whatToDo}
          </li>
        ))}
      </ul>
      {props.problems.length > 5 && <p>And {props.problems.length - 5} more.</p>}
    </div>
  )
}
