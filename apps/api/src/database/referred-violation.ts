/**
 * True for the refusal to delete a row that others refer to (PostgreSQL manual, appendix A: 23001 raised by triggers and
 * by newer servers, 23503 by foreign keys that restrict).
 */
export function isReferredViolation(error: unknown): boolean {
  const { cause } = error as { cause?: { code?: string } };
  return cause?.code === '23001' || cause?.code === '23503';
}

/** True when it was an issued report that forbade it. */
export function isKeptByReport(error: unknown): boolean {
  const { cause } = error as { cause?: { code?: string; constraint?: string } };
  return cause?.code === '23001' && cause.constraint === 'report_references_kept';
}
