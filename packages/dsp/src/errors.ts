/** The input cannot be analysed; the message says what is wrong and where, in plain words. */
export class AnalysisInputError extends Error {
  override readonly name = 'AnalysisInputError';

  /** @param value name of the value of a stage that is at fault, where it is one */
  constructor(
    message: string,
    readonly value?: string,
  ) {
    super(message);
  }
}

/** The caller's shouldStop() answered true. */
export class AnalysisStopped extends Error {
  override readonly name = 'AnalysisStopped';

  constructor() {
    super('The analysis was stopped before it was complete.');
  }
}
