import type { RequestHandler } from 'express';
import { problem } from '../common/problem.js';

const KNOWN = ['application/json', 'multipart/form-data'];

/** Media type of the bytes of a resumable upload (tus 1.0), and where those go. */
const UPLOADED_BYTES = 'application/offset+octet-stream';
const UPLOADS = /^\/projects\/[^/]+\/uploads(\/[^/]+)?\/?$/;

/**
 * Refuses bodies that are neither JSON nor an upload: a form of another site can send plain text,
 * but not JSON, without the browser asking first.
 */
export const demandKnownContentType: RequestHandler = (request, _response, next) => {
  const hasBody =
    request.headers['transfer-encoding'] !== undefined || Number(request.headers['content-length']) > 0;
  const known = UPLOADS.test(request.path) ? [...KNOWN, UPLOADED_BYTES] : KNOWN;
  if (!hasBody || request.is(known)) return next();
  next(problem(415, 'unsupported-media-type', 'Send JSON with Content-Type: application/json'));
};
