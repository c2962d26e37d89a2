import type { FieldValues, Path, UseFormReturn } from 'react-hook-form';
import { ApiProblem, problemText } from './api-problem.js';

/** `/channels/0/name` (JSON pointer) and `channels.0.name` both become `channels.0.name`. */
const fieldPath = (path: string) => path.replace(/^\//, '').replaceAll('/', '.');

const hasField = (values: FieldValues, path: string) =>
  path.split('.')[0] !== '' && path.split('.')[0]! in values;

/**
 * Puts a refused submission back into the form: messages go beside their fields, the rest above the
 * buttons as `errors.root`.
 */
export function setFormProblem<I extends FieldValues, C, O>(
  form: UseFormReturn<I, C, O>,
  error: unknown,
): void {
  const values = form.getValues();
  const entries = error instanceof ApiProblem ? error.errors : [];
  const placed = entries.filter((entry) => hasField(values, fieldPath(entry.path)));
  for (const entry of placed) {
    form.setError(fieldPath(entry.path) as Path<I>, { type: 'server', message: entry.message });
  }
  if (placed.length > 0 && placed.length === entries.length) return;
  const unplaced = entries.filter((entry) => !placed.includes(entry)).map((entry) => entry.message);
  form.setError('root', {
    type: 'server',
    message: unplaced.length > 0 ? unplaced.join(' ') : problemText(error),
  });
}
