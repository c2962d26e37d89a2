import { expect, it } from 'vitest';
import { z } from 'zod';
import { defineJob } from '../jobs/job-definition.js';
import { matchHandlers } from './match-handlers.js';

const [read, render] = ['read', 'render'].map((name) =>
  defineJob({ name, payload: z.object({}), maxAttempts: 1, key: () => name }),
);
const handlerOf = (definition: typeof read) => ({
  definition: definition!,
  run: () => Promise.resolve(),
  giveUp: () => Promise.resolve(),
});

it('gives each job its handler', () => {
  const handlers = [handlerOf(read), handlerOf(render)];
  expect([...matchHandlers([read!, render!], handlers).keys()]).toEqual(['read', 'render']);
});

it('refuses a job without a handler, with two, and a handler without a job', () => {
  expect(() => matchHandlers([read!, render!], [handlerOf(read)])).toThrow(
    'No handler is registered for: render',
  );
  expect(() => matchHandlers([read!], [handlerOf(read), handlerOf(read)])).toThrow('Two handlers');
  expect(() => matchHandlers([read!], [handlerOf(read), handlerOf(render)])).toThrow('unknown job render');
});
