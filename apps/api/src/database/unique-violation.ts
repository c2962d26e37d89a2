/** True for the refusal of a row that breaks the named unique constraint (PostgreSQL manual, appendix A: 23505). */
export function isUniqueViolation(error: unknown, constraint: string): boolean {
  const { cause } = error as { cause?: { code?: string; constraint?: string } };
  return cause?.code === '23505' && cause.constraint === constraint;
}
