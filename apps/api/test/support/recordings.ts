import type { Analysis, Recording } from '@overtally/contracts';
import { setTimeout as wait } from 'node:timers/promises';
import type TestAgent from 'supertest/lib/agent.js';

const pollMs = 30;
const patienceMs = 60_000;

/** Uploads a capture and returns the recording as the API answers, with the status 202 checked. */
export async function upload(
  agent: TestAgent,
  projectId: string,
  bytes: Buffer,
  fileName: string,
  fields: Record<string, string> = {},
): Promise<Recording> {
  const request = agent.post(`/api/projects/${projectId}/recordings`).attach('file', bytes, fileName);
  for (const [name, value] of Object.entries(fields)) void request.field(name, value);
  const response = await request;
  if (response.status !== 202) throw new Error(`${response.status}: ${response.text}`);
  return response.body as Recording;
}

/** The answer of `path` once `done` holds for it. */
export async function eventually<T>(
  agent: TestAgent,
  path: string,
  done: (body: T) => boolean,
  withinMs = patienceMs,
): Promise<T> {
  const end = Date.now() + withinMs;
  for (;;) {
    const { body } = (await agent.get(path).expect(200)) as { body: T };
    if (done(body)) return body;
    if (Date.now() > end) throw new Error(`${path} stayed at ${JSON.stringify(body).slice(0, 500)}`);
    await wait(pollMs);
  }
}

/** The recording once it is ready or has failed. */
export function settled(agent: TestAgent, id: string, withinMs = patienceMs): Promise<Recording> {
  return eventually<Recording>(
    agent,
    `/api/recordings/${id}`,
    ({ status }) => ['ready', 'failed'].includes(status),
    withinMs,
  );
}

/** The analysis once it is done or has failed. */
export function ended(agent: TestAgent, id: string): Promise<Analysis> {
  return eventually<Analysis>(agent, `/api/analyses/${id}`, ({ status }) =>
    ['done', 'failed'].includes(status),
  );
}
