/** What the tests use of the package's solver: its own sources, which it gives for types, do not hold to this project's strictness. */
export class Solver {
  constructor(dimension: number)
  absoluteTolerance: number
  relativeTolerance: number
  maxSteps: number
  initialStepSize: number
  maxStepSize: number
  denseOutput: boolean
  solve(
    derivative: (x: number, y: number[]) => number[],
    start: number,
    initial: number[],
    end: number,
    solOut?: (
      n: number,
      xOld: number,
      x: number,
      y: number[],
      dense: (component: number, x: number) => number,
    ) => boolean | undefined,
  ): { y: number[]; outcome: number; nStep: number; xEnd: number; nAccept: number; nReject: number; nEval: number }
}
