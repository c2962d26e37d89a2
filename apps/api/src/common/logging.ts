import type { IncomingMessage } from 'node:http';
import type { Params } from 'nestjs-pino';
import type { AppConfig } from '../config/app-config.js';

/** Structured logs of requests and of the application; nothing secret is written. */
export function loggerParams(config: AppConfig): Params {
  return {
    pinoHttp: {
      level: config.logLevel,
      genReqId: (request: IncomingMessage) => request.id,
      redact: {
        paths: ['req.headers.cookie', 'req.headers.authorization', 'res.headers["set-cookie"]'],
        censor: '[hidden]',
      },
      serializers: {
        req: (request: { id: string; method: string; url: string; remoteAddress: string }) => ({
          id: request.id,
          method: request.method,
          url: request.url,
          remoteAddress: request.remoteAddress,
        }),
        res: (response: { statusCode: number }) => ({ statusCode: response.statusCode }),
      },
      customLogLevel: (_request, response, error) =>
        error || response.statusCode >= 500 ? 'error' : response.statusCode >= 400 ? 'warn' : 'info',
      autoLogging: { ignore: (request) => request.url === '/api/health' },
      ...(config.logFormat === 'pretty' && {
        transport: {
          target: 'pino-pretty',
          options: {
            singleLine: true,
            ignore: 'pid,hostname,context,req,res',
            messageFormat: PRETTY_MESSAGE,
          },
        },
      }),
    },
  };
}

const PRETTY_MESSAGE =
  '{if context}{context}: {end}{msg}{if req.url} {req.method} {req.url} {res.statusCode}{end}';
