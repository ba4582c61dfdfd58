/** One thing wrong with what was given: where (a JSON path such as `points.3.sd`), and a sentence that says what to do. */
export interface InputProblem {
  path: string
  message: string
}

/** Unusable input to the numerics; carries every problem at once. */
export class ScienceError extends Error {
  constructor(readonly code: string, readonly problems: readonly InputProblem[] = []) {
    super([code, ...problems.map(problem => `${problem.path}: ${problem.message}`)].join('\n'))
    this.name = 'ScienceError'
  }
}
