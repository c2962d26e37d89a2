import { Catch, HttpException, Logger, type ArgumentsHost, type ExceptionFilter } from '@nestjs/common';
import type { ProblemDetails } from '@overtally/contracts';
import type { Response } from 'express';
import pg from 'pg';
import { ZodSerializationException, ZodValidationException } from 'nestjs-zod';
import { z } from 'zod';
import { ProblemException, problemBody } from './problem.js';
import type { AppRequest } from './request.js';

interface Answer {
  status: number;
  extra: Pick<ProblemDetails, 'code' | 'detail' | 'errors'>;
  headers?: Record<string, string>;
}

/** Turns whatever was thrown into application/problem+json; what is unknown is logged and answered bare. */
@Catch()
export class ProblemFilter implements ExceptionFilter {
  private readonly logger = new Logger(ProblemFilter.name);

  catch(error: unknown, host: ArgumentsHost): void {
    const request = host.switchToHttp().getRequest<AppRequest>();
    const response = host.switchToHttp().getResponse<Response>();
    const { status, extra, headers } = answerTo(error);
    if (status >= 500) this.logger.error({ err: loggable(error), requestId: request.id }, 'Request failed');
    if (response.headersSent) {
      // A reply that broke off half way must not look complete.
      response.destroy();
      return;
    }
    response
      .status(status)
      .set(headers ?? {})
      .type('application/problem+json')
      .send(JSON.stringify(problemBody(status, request.id, extra)));
  }
}

function answerTo(error: unknown): Answer {
  if (error instanceof ProblemException) {
    const { code, detail, errors, headers } = error;
    return { status: error.getStatus(), extra: { code, detail, errors }, headers };
  }
  if (error instanceof ZodValidationException) return invalidRequest(error);
  if (error instanceof HttpException && error.getStatus() < 500) {
    return { status: error.getStatus(), extra: { detail: error.message } };
  }
  if (error instanceof HttpException && error.getStatus() === 503) {
    return { status: 503, extra: { detail: 'A part this service needs is not available' } };
  }
  if (isKeptByReport(error)) {
    const detail = 'It stands in an issued report, so it stays on record and cannot be deleted';
    return { status: 409, extra: { code: 'stands-in-issued-report', detail } };
  }
  if (isClientHttpError(error)) return { status: error.status, extra: { detail: error.message } };
  return { status: 500, extra: { detail: 'Unexpected error; the log has more under the request id' } };
}

/** The refusal of the database to delete what an issued report speaks of (trigger `keep_referred`). */
function isKeptByReport(error: unknown): boolean {
  const cause = error instanceof Error ? error.cause : undefined;
  return cause instanceof pg.DatabaseError && cause.constraint === 'report_references_kept';
}

function invalidRequest(error: ZodValidationException): Answer {
  const cause = error.getZodError();
  const issues = cause instanceof z.ZodError ? cause.issues : [];
  const errors = issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message }));
  const detail = 'The request does not have the expected form; see errors';
  return { status: 400, extra: { code: 'invalid-request', detail, errors } };
}

/** Errors of the body parser and the router carry a status, and say whether their text may be shown. */
function isClientHttpError(error: unknown): error is Error & { status: number } {
  if (!(error instanceof Error) || !('status' in error)) return false;
  const { status } = error;
  return typeof status === 'number' && status >= 400 && status < 500;
}

function loggable(error: unknown): unknown {
  return error instanceof ZodSerializationException ? error.getZodError() : error;
}
