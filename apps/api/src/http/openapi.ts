import { Injectable } from '@nestjs/common';
import type { NestExpressApplication } from '@nestjs/platform-express';
import { DocumentBuilder, SwaggerModule, type OpenAPIObject } from '@nestjs/swagger';
import { cleanupOpenApiDoc } from 'nestjs-zod';
import { SESSION_COOKIE } from '../auth/session.middleware.js';

const DESCRIPTION = [
  'From a bench capture to a signed harmonic report.',
  'SI units in field names, times ISO 8601 in UTC, ids are UUIDs; a figure that does not apply is null.',
  'Sign in with a session cookie, or send a personal access key as `Authorization: Bearer …`.',
  'Lists are pages: pass `nextCursor` as `cursor` to get the next one.',
  'Refusals are problem details (RFC 9457) with `code` for programs and `errors` for invalid fields.',
].join('\n');

/** The OpenAPI document, made from the same schemas that check requests and replies. */
@Injectable()
export class OpenApi {
  private built?: OpenAPIObject;

  /** Builds the document once all routes and the prefix are known. */
  build(app: NestExpressApplication): void {
    const base = new DocumentBuilder()
      .setOpenAPIVersion('3.1.0')
      .setTitle('Overtally')
      .setDescription(DESCRIPTION)
      .setVersion('1')
      .addCookieAuth(SESSION_COOKIE, { type: 'apiKey', in: 'cookie', name: SESSION_COOKIE }, 'session')
      .addSecurity('bearer', { type: 'http', scheme: 'bearer', description: 'Personal access key' })
      .build();
    const document = SwaggerModule.createDocument(app, base, {
      operationIdFactory: (controller, method) => `${controller.replace(/Controller$/, '')}_${method}`,
    });
    this.built = cleanupOpenApiDoc(document);
  }

  get document(): OpenAPIObject {
    if (!this.built) throw new Error('The OpenAPI document is asked for before the application is set up');
    return this.built;
  }
}
