import type { NestExpressApplication } from '@nestjs/platform-express';
import compression from 'compression';
import { Logger } from 'nestjs-pino';
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
  // Behind TLS there is a proxy of our own network that tells scheme and address of the caller.
  app.set('trust proxy', config.isHttps ? 'loopback, linklocal, uniquelocal' : false);
  app.use(requestId, securityHeaders(config), compression());
  if (config.webDist) serveWeb(app, config.webDist);
  app.enableCsrfProtection({ trustedOrigins: [new URL(config.publicUrl).origin] });
  app.use('/api', demandKnownContentType);
  app.useBodyParser('json', { limit: JSON_LIMIT });
  app.setGlobalPrefix('api');
  app.get(OpenApi).build(app);
  app.getHttpServer().requestTimeout = REQUEST_TIMEOUT_MS;
}
