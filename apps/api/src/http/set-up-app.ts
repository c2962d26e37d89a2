import type { NestExpressApplication } from '@nestjs/platform-express';
import compression from 'compression';
import type { Request } from 'express';
import { Logger } from 'nestjs-pino';
import { bearerSecret } from '../access/access-key.js';
import { SESSION_COOKIE } from '../auth/session.middleware.js';
import { AppConfig } from '../config/app-config.js';
import { demandKnownContentType } from './content-type.middleware.js';
import { usePlainMessages } from './plain-messages.js';
import { requestId } from './request-id.middleware.js';
import { securityHeaders } from './security-headers.js';
import { OpenApi } from './openapi.js';
import { serveWeb } from './serve-web.js';

/** Largest JSON body; files come as multipart and have their own limit. */
const JSON_LIMIT = '1mb';

/** Long enough for the largest upload over a slow line; headers alone have a minute (Node's default). */
const REQUEST_TIMEOUT_MS = 4 * 60 * 60 * 1000;

/** Puts everything around the modules that a request passes, in order. */
export function setUpApp(app: NestExpressApplication): void {
  const config = app.get(AppConfig);
  usePlainMessages();
  app.useLogger(app.get(Logger));
  app.enableShutdownHooks();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxy);
  app.use(requestId, securityHeaders(config), compression());
  if (config.webDist) serveWeb(app, config.webDist);
  app.enableCsrfProtection({
    trustedOrigins: [new URL(config.publicUrl).origin],
    exclude: isSignedByKeyAlone,
  });
  app.use('/api', demandKnownContentType);
  app.useBodyParser('json', { limit: JSON_LIMIT });
  app.setGlobalPrefix('api');
  app.get(OpenApi).build(app);
  app.getHttpServer().requestTimeout = REQUEST_TIMEOUT_MS;
}

/** A key is sent by a script on purpose, a cookie by any browser unasked: only a request without one is safe. */
function isSignedByKeyAlone(request: Request): boolean {
  const cookies = (request.headers.cookie ?? '').split(';').map((cookie) => cookie.trim());
  const hasSession = cookies.some((cookie) => cookie.startsWith(`${SESSION_COOKIE}=`));
  return bearerSecret(request) !== undefined && !hasSession;
}
