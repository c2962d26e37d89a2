/** The input cannot be analysed; the message says what is wrong and where, in plain words. */
export class AnalysisInputError extends Error {
  override readonly name = 'AnalysisInputError';
}

/** The caller's shouldStop() answered true. */
export class AnalysisStopped extends Error {
  override readonly name = 'AnalysisStopped';

  constructor() {
    super('The analysis was stopped before it was complete.');
  }
}
