import type { JobDefinition } from '../jobs/job-definition.js';
import type { JobHandler } from '../jobs/job-handler.js';

/** A handler whose payload type is checked by its definition at run time. */
// eslint-disable-next-line @typescript-eslint/no-explicit-any -- handlers of unlike payloads stand in one list
export type AnyHandler = JobHandler<any>;

/**
 * Handlers by the name of their definition.
 * @throws Error when a definition has no handler or two, or a handler is for no known definition
 */
export function matchHandlers(
  definitions: readonly Pick<JobDefinition, 'name'>[],
  handlers: readonly AnyHandler[],
): Map<string, AnyHandler> {
  const byName = new Map<string, AnyHandler>();
  for (const handler of handlers) {
    const { name } = handler.definition;
    if (!definitions.some((definition) => definition.name === name)) {
      throw new Error(`A handler is registered for the unknown job ${name}`);
    }
    if (byName.has(name)) throw new Error(`Two handlers are registered for the job ${name}`);
    byName.set(name, handler);
  }
  const missing = definitions.filter(({ name }) => !byName.has(name)).map(({ name }) => name);
  if (missing.length > 0) throw new Error(`No handler is registered for: ${missing.join(', ')}`);
  return byName;
}
