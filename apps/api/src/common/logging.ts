import type { IncomingMessage } from 'node:http';
import type { Params } from 'nestjs-pino';
import type pino from 'pino';
import type { AppConfig } from '../config/app-config.js';

/** Structured logs of requests and of the application; nothing secret is written. */
export function loggerParams(config: AppConfig): Params {
  return {
    forRoutes: ['{*path}'],
    pinoHttp: {
      level: config.logLevel,
      hooks: { logMethod: withoutStartDetails },
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

/** Contexts in which the framework tells at each start what it wires; the same every time. */
const START_DETAILS = new Set(['InstanceLoader', 'RoutesResolver', 'RouterExplorer', 'NestFactory']);
const INFO = 30;

function withoutStartDetails(
  this: pino.Logger,
  parts: Parameters<pino.LogFn>,
  method: pino.LogFn,
  level: number,
): void {
  const [first] = parts as unknown[];
  const context =
    typeof first === 'object' && first !== null && 'context' in first ? first.context : undefined;
  if (level <= INFO && typeof context === 'string' && START_DETAILS.has(context)) return;
  method.apply(this, parts);
}
