import { problemDetailsSchema, type ProblemDetails } from '@overtally/contracts';
import { vi } from 'vitest';

export interface SeenRequest {
  method: string;
  /** Path with query: `/projects?limit=200`. */
  path: string;
  body: unknown;
}

type Answer = (request: SeenRequest) => Response;

export const json =
  (body: unknown, status = 200): Answer =>
  () =>
    new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } });

export const page = (items: readonly unknown[]): Answer => json({ items, nextCursor: null });

export const noContent = (): Answer => () => new Response(null, { status: 204 });

export const problem =
  (status: number, rest: Partial<ProblemDetails> = {}, headers: Record<string, string> = {}): Answer =>
  () => {
    const body = problemDetailsSchema.parse({ type: 'about:blank', title: 'Refused', status, ...rest });
    return new Response(JSON.stringify(body), {
      status,
      headers: { 'content-type': 'application/problem+json', ...headers },
    });
  };

/**
 * Answers requests by method and path without query: `{ 'GET /projects': page([]) }`. A request without an
 * answer fails the test. Returns what was asked, in order.
 */
export function mockApi(answers: Record<string, Answer>): SeenRequest[] {
  const seen: SeenRequest[] = [];
  vi.stubGlobal('fetch', (input: string, init: RequestInit = {}): Promise<Response> => {
    const url = new URL(input, 'http://localhost');
    const path = url.pathname.replace(/^\/api/, '');
    const method = init.method ?? 'GET';
    const answer = answers[`${method} ${path}`];
    if (!answer) throw new Error(`The test has no answer for ${method} ${path}`);
    const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : init.body;
    const request = { method, path: `${path}${url.search}`, body };
    seen.push(request);
    return Promise.resolve(answer(request));
  });
  return seen;
}
