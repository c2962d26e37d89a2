import type { NestExpressApplication } from '@nestjs/platform-express';
import { static as staticFiles, type RequestHandler, type Response } from 'express';
import { join, sep } from 'node:path';

/** Serves the built web application: hashed assets for good, the page itself fresh each time. */
export function serveWeb(app: NestExpressApplication, webDist: string): void {
  const assets = join(webDist, 'assets') + sep;
  const setHeaders = (response: Response, path: string) => {
    const isHashed = path.startsWith(assets);
    response.setHeader('Cache-Control', isHashed ? 'public, max-age=31536000, immutable' : 'no-cache');
  };
  app.use(staticFiles(webDist, { setHeaders, cacheControl: false }));
  app.use(pageForAddresses(join(webDist, 'index.html')));
}

/** Pages that links with a secret lead to; where they lead on to is not told of them. */
const SECRET_PAGES = new Set(['/invitation', '/reset-password']);

/** Addresses of the application's pages all get its one page; what looks like a file stays missing. */
function pageForAddresses(indexHtml: string): RequestHandler {
  return (request, response, next) => {
    const isRead = request.method === 'GET' || request.method === 'HEAD';
    const isApi = request.path === '/api' || request.path.startsWith('/api/');
    const isFile = request.path.startsWith('/assets/');
    if (!isRead || isApi || isFile || !request.accepts('html')) return next();
    if (SECRET_PAGES.has(request.path)) response.setHeader('Referrer-Policy', 'no-referrer');
    response.sendFile(indexHtml, { headers: { 'Cache-Control': 'no-cache' }, cacheControl: false }, next);
  };
}
