import type { RequestHandler } from 'express';
import { problem } from '../common/problem.js';

const KNOWN = ['application/json', 'multipart/form-data'];

/**
 * Refuses bodies that are neither JSON nor an upload: a form of another site can send plain text,
 * but not JSON, without the browser asking first.
 */
export const demandKnownContentType: RequestHandler = (request, _response, next) => {
  const hasBody =
    request.headers['transfer-encoding'] !== undefined || Number(request.headers['content-length']) > 0;
  if (!hasBody || request.is(KNOWN)) return next();
  next(problem(415, 'unsupported-media-type', 'Send JSON with Content-Type: application/json'));
};
