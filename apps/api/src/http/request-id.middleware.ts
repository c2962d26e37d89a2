import type { RequestHandler } from 'express';
import { randomUUID } from 'node:crypto';

/** Gives each request an id for log and reply; one from outside is not taken over, so that ids stay unique. */
export const requestId: RequestHandler = (request, response, next) => {
  request.id = randomUUID();
  response.setHeader('x-request-id', request.id);
  next();
};
