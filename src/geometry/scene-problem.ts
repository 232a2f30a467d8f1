/** What is wrong with a scene, a team or an option, where, and what to do about it. */
export interface SceneProblem {
  /** Keys and indexes from the object's root, joined by '/'; '' is the whole. */
  path: string
  expected: string
  found: string
  whatToDo: string
}

/** One line for a terminal or a log. */
export function sayProblem(problem: SceneProblem): string {
  const where = problem.path === '' ? '' : `${problem.path}: `
  return `${where}expected ${problem.expected}, found ${problem.found}. ${problem.whatToDo}`
}
