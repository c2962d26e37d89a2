import { HttpException } from '@nestjs/common';
import { STATUS_CODES } from 'node:http';
import type { ProblemDetails } from '@overtally/contracts';

/** One invalid field of the request: dotted path and what to do about it. */
export type FieldError = NonNullable<ProblemDetails['errors']>[number];

/** A refusal with an answer for the caller, sent as application/problem+json (RFC 9457). */
export class ProblemException extends HttpException {
  constructor(
    status: number,
    readonly code: string,
    readonly detail: string,
    readonly errors?: FieldError[],
    readonly headers: Record<string, string> = {},
  ) {
    super(detail, status);
  }
}

/**
 * Makes a problem to throw.
 * @param status HTTP status, 400 to 599
 * @param code stable kebab-case code for programs
 * @param detail what happened and what to do about it, for people
 * @param errors one entry per invalid field
 */
export function problem(
  status: number,
  code: string,
  detail: string,
  errors?: FieldError[],
): ProblemException {
  return new ProblemException(status, code, detail, errors);
}

/** The title of a problem is the phrase of its status (RFC 9457, 4.2.1: `about:blank`). */
export function problemBody(
  status: number,
  instance: string | undefined,
  extra: Pick<ProblemDetails, 'code' | 'detail' | 'errors'> = {},
): ProblemDetails {
  return { type: 'about:blank', title: STATUS_CODES[status] ?? 'Error', status, ...extra, instance };
}
