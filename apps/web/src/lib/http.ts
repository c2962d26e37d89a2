import type { z } from 'zod';
import { ApiProblem, problemFrom } from './api-problem.js';

type Query = Record<string, string | number | boolean | null | undefined>;

export interface RequestOptions {
  method?: 'GET' | 'POST' | 'PATCH' | 'PUT' | 'DELETE';
  /** Sent as JSON; a FormData is sent as it is. */
  body?: unknown;
  /** Entries that are null, undefined or empty are left out. */
  query?: Query;
  signal?: AbortSignal;
}

type SignedOutListener = () => void;
let signedOutListener: SignedOutListener = () => undefined;

/** Says what happens when a request is refused because nobody is signed in (401). */
export function onSignedOut(listener: SignedOutListener): void {
  signedOutListener = listener;
}

/** Address of an API resource, `path` without the prefix: `/projects`. */
export function apiUrl(path: string, query: Query = {}): string {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value !== null && value !== undefined && value !== '') search.set(name, String(value));
  }
  const tail = search.toString();
  return `/api${path}${tail ? `?${tail}` : ''}`;
}

function encodeBody(body: unknown): Pick<RequestInit, 'body' | 'headers'> {
  const accept = 'application/json, application/problem+json';
  if (body === undefined) return { headers: { accept } };
  if (body instanceof FormData) return { body, headers: { accept } };
  return { body: JSON.stringify(body), headers: { accept, 'content-type': 'application/json' } };
}

/** Sends a request; a reply that is no success becomes an `ApiProblem`. Aborting keeps its own error. */
export async function request(path: string, options: RequestOptions = {}): Promise<Response> {
  const { method = 'GET', body, query, signal } = options;
  const response = await fetch(apiUrl(path, query), {
    method,
    ...encodeBody(body),
    credentials: 'same-origin',
    ...(signal ? { signal } : {}),
  }).catch((error: unknown) => {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new ApiProblem({
      status: 0,
      title: 'No connection',
      detail: 'The server could not be reached. Check the connection and try again.',
    });
  });
  if (response.ok) return response;
  const problem = await problemFrom(response);
  if (problem.status === 401 && !path.startsWith('/auth/')) signedOutListener();
  throw problem;
}

/** Sends a request and parses the reply with its schema of the contracts. */
export async function requestJson<S extends z.ZodType>(
  schema: S,
  path: string,
  options: RequestOptions = {},
): Promise<z.output<S>> {
  const response = await request(path, options);
  const parsed = schema.safeParse(await response.json());
  if (parsed.success) return parsed.data;
  const first = parsed.error.issues[0];
  throw new ApiProblem({
    status: response.status,
    title: 'The reply was not understood',
    detail: `This page and the server seem to be of different versions: reload the page. (${path}: ${first?.path.join('.') ?? ''} ${first?.message ?? ''})`,
  });
}

/** Sends a request whose reply has no body. */
export async function requestEmpty(path: string, options: RequestOptions = {}): Promise<void> {
  await request(path, options);
}
