import { Injectable, type ArgumentMetadata } from '@nestjs/common';
import { ZodValidationPipe } from 'nestjs-zod';
import { problem, type FieldError } from './problem.js';

const loneSurrogate = /\p{Cs}/u;

/**
 * Checks what comes in by the schema of its DTO. Text that the database cannot keep is refused besides: the character
 * NUL, and halves of surrogate pairs, which are no characters (PostgreSQL manual, 8.14.1 and 8.3).
 */
@Injectable()
export class ValidationPipe extends ZodValidationPipe {
  override transform(value: unknown, metadata: ArgumentMetadata): unknown {
    const checked: unknown = super.transform(value, metadata);
    // Uploaded files and the like come from decorators of their own.
    if (metadata.type === 'custom') return checked;
    const errors = [...unfitTexts(checked, metadata.data ?? '')];
    if (errors.length === 0) return checked;
    throw problem(400, 'invalid-request', 'The request holds text that cannot be kept; see errors', errors);
  }
}

function* unfitTexts(value: unknown, path: string): Generator<FieldError> {
  if (typeof value === 'string') {
    if (value.includes('\0') || loneSurrogate.test(value)) {
      yield { path, message: 'Take out the characters that are no text, such as NUL' };
    }
  } else if (typeof value === 'object' && value !== null) {
    for (const [key, member] of Object.entries(value)) {
      const place = path === '' ? key : `${path}.${key}`;
      yield* unfitTexts(key, place);
      yield* unfitTexts(member, place);
    }
  }
}
