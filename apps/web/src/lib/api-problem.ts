import { problemDetailsSchema, type ProblemDetails } from '@overtally/contracts';

/** A request that the server refused or that did not reach it (`status` 0). */
export class ApiProblem extends Error {
  readonly status: number;
  readonly title: string;
  readonly detail: string | null;
  readonly code: string | null;
  /** Request id for the server's log. */
  readonly instance: string | null;
  readonly errors: NonNullable<ProblemDetails['errors']>;
  readonly retryAfterS: number | null;

  constructor(problem: Partial<ProblemDetails> & { title: string; status: number }, retryAfterS?: number) {
    super(problem.detail ?? problem.title);
    this.name = 'ApiProblem';
    this.status = problem.status;
    this.title = problem.title;
    this.detail = problem.detail ?? null;
    this.code = problem.code ?? null;
    this.instance = problem.instance ?? null;
    this.errors = problem.errors ?? [];
    this.retryAfterS = retryAfterS ?? null;
  }
}

/** Reads problem details (RFC 9457) from a reply that is not a success; any other body gives a plain problem. */
export async function problemFrom(response: Response): Promise<ApiProblem> {
  const retryAfter = Number(response.headers.get('retry-after') ?? Number.NaN);
  const retryAfterS = Number.isFinite(retryAfter) ? retryAfter : undefined;
  const type = response.headers.get('content-type') ?? '';
  const body: unknown = type.includes('json') ? await response.json() : null;
  const problem = problemDetailsSchema.safeParse(body);
  if (problem.success) return new ApiProblem(problem.data, retryAfterS);
  return new ApiProblem(
    {
      status: response.status,
      title: `The server answered ${response.status}`,
      detail: 'It did not say why. Try again; if it stays so, tell your administrator.',
    },
    retryAfterS,
  );
}

/** Sentence to show for any error. */
export function problemText(error: unknown): string {
  if (error instanceof ApiProblem) return error.detail ?? error.title;
  return error instanceof Error ? error.message : 'Something went wrong.';
}
