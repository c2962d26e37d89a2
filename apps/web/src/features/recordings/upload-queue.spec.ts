import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { queryClient } from '../../lib/query-client.js';
import { fakeUploadServer } from '../../testing/fake-upload-server.js';
import { sampleId } from '../../testing/samples.js';
import { uploadLimitsQuery } from './api/upload-limits.js';
import { UploadQueue } from './upload-queue.js';
import { digestBlob } from '../../lib/digest/file-digest.js';

const projectId = sampleId(10);

/** A moment later than any other file, so that no test knows the file of another. */
let moment = 1;
const capture = (name: string, text = 'abcdefgh') => new File([text], name, { lastModified: moment++ });

function queueOf(digest: (file: File) => Promise<string> = digestBlob) {
  return new UploadQueue(projectId, {
    limits: () => queryClient.fetchQuery(uploadLimitsQuery(projectId)),
    digest,
    onArrived: () => undefined,
    onUnfinished: () => undefined,
  });
}

async function send(queue: UploadQueue, ...files: File[]) {
  const items = await queue.add(files.map((file) => ({ file, path: file.name })));
  for (const { id } of items) queue.send(id);
  return items.map(({ id }) => id);
}

const states = (queue: UploadQueue) => queue.snapshot().map(({ state }) => state);
const become = (queue: UploadQueue, ...expected: string[]) =>
  vi.waitFor(() => expect(states(queue)).toEqual(expected), { timeout: 5000 });
const item = (queue: UploadQueue) => {
  const [first] = queue.snapshot();
  if (!first) throw new Error('The list is empty');
  return first;
};

beforeEach(() => localStorage.clear());
afterEach(() => void vi.restoreAllMocks());

describe('upload queue', () => {
  it('sends two at a time, the next when one has arrived, and checks each by its SHA-256', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    server.fates.push('hangs', 'hangs');
    const queue = queueOf();
    await send(queue, capture('a.csv'), capture('b.csv'), capture('c.csv', 'abc'));
    await vi.waitFor(() => expect(server.held.size).toBe(2));
    expect(states(queue)).toEqual(['sending', 'sending', 'waiting']);
    queue.pause(item(queue).id);
    await become(queue, 'paused', 'sending', 'done');
    // FIPS 180-4, example of one block: SHA-256 of "abc".
    expect(queue.snapshot()[2]?.sha256).toBe(
      'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad',
    );
  });

  it('holds an upload and goes on at the byte where it stopped', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    server.fates.push('hangs');
    const queue = queueOf();
    const [id = 0] = await send(queue, capture('a.csv'));
    await vi.waitFor(() => expect([...server.held.values()][0]?.bytes).toHaveLength(4));
    queue.pause(id);
    server.cut();
    expect(states(queue)).toEqual(['paused']);
    queue.resume(id);
    await become(queue, 'done');
    expect(server.requests.map((request) => request.split(' ')[0])).toEqual([
      'POST',
      'PATCH',
      'HEAD',
      'PATCH',
    ]);
  });

  it('goes on by itself when the connection is back', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    const online = vi.spyOn(navigator, 'onLine', 'get').mockReturnValue(false);
    server.fates.push('breaks-off-halfway');
    const queue = queueOf();
    await send(queue, capture('a.csv'));
    await become(queue, 'interrupted');
    online.mockReturnValue(true);
    window.dispatchEvent(new Event('online'));
    await become(queue, 'done');
    expect(server.requests.filter((request) => request.startsWith('POST'))).toHaveLength(1);
  });

  it('tries again by itself where a single request is cut off', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    server.fates.push('breaks-off');
    const queue = queueOf();
    await send(queue, capture('a.csv'));
    await become(queue, 'interrupted');
    await become(queue, 'done');
  });

  it('goes on after a reload when the same file comes again, also where the browser forgot it', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    server.fates.push('hangs', 'hangs');
    const file = capture('a.csv');
    await send(queueOf(), file);
    await vi.waitFor(() => expect([...server.held.values()][0]?.bytes).toHaveLength(4));
    server.requests.length = 0;
    const reloaded = queueOf();
    const [id = 0] = await send(reloaded, new File([file], 'a.csv', { lastModified: file.lastModified }));
    // Half of the other half hangs again.
    await vi.waitFor(() => expect([...server.held.values()][0]?.bytes).toHaveLength(6));
    reloaded.pause(id);
    localStorage.clear();
    const elsewhere = queueOf();
    await send(elsewhere, capture('a.csv'));
    await become(elsewhere, 'done');
    expect(server.requests.map((request) => request.split(' ')[0])).toEqual([
      'HEAD',
      'PATCH',
      'HEAD',
      'PATCH',
    ]);
    expect(localStorage).toHaveLength(0);
  });

  it('begins anew for a file of the same name and another size, and for one that is sent already', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    server.fates.push('hangs');
    const queue = queueOf();
    await send(queue, capture('a.csv'));
    await vi.waitFor(() => expect(server.held.size).toBe(1));
    await send(queue, capture('a.csv', 'longer than the other'), capture('a.csv'));
    await become(queue, 'sending', 'done', 'done');
    expect(server.requests.filter((request) => request.startsWith('POST'))).toHaveLength(3);
  });

  it('says so when what arrived is not what is here, and sends it again from the beginning', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    const digest = vi.fn(digestBlob).mockResolvedValueOnce('0'.repeat(64));
    const queue = queueOf(digest);
    const [id = 0] = await send(queue, capture('a.csv', 'abc'));
    await become(queue, 'failed');
    expect(String(item(queue).error)).toContain('What arrived has the SHA-256 ba7816bf');
    queue.resume(id);
    await become(queue, 'done');
    expect(server.requests.filter((request) => request.startsWith('PATCH'))).toHaveLength(2);
  });

  it('stops an upload on the server too and goes on with the others', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    server.fates.push('hangs', 'hangs');
    const queue = queueOf();
    const [first = 0] = await send(queue, capture('a.csv'), capture('b.csv'), capture('c.csv'));
    await vi.waitFor(() => expect(server.held.size).toBe(2));
    queue.stop(first);
    await become(queue, 'stopped', 'sending', 'done');
    expect(item(queue).url).toBeNull();
    queue.stopAll();
    await vi.waitFor(() => expect(server.held.size).toBe(0));
    expect(states(queue)).toEqual(['stopped', 'stopped', 'done']);
    expect(localStorage).toHaveLength(0);
  });

  it('refuses at once, with the figures, what the project cannot take', async () => {
    const server = fakeUploadServer(projectId, { maxFileBytes: 40, quotaBytes: 100, usedBytes: 65 });
    server.serve();
    server.fates.push('hangs');
    const queue = queueOf();
    await send(queue, capture('fits.csv', 'x'.repeat(30)), capture('large.csv', 'x'.repeat(50)));
    await send(queue, capture('more.csv', 'x'.repeat(10)));
    const [, large, more] = queue.snapshot().map(({ error }) => String(error).replaceAll('\u00a0', ' '));
    expect(large).toContain('the file has 50 B, the limit is 40 B');
    expect(more).toContain('holds 65 B of its 100 B and 30 B more are under way; 10 B do not fit');
    await vi.waitFor(() =>
      expect([...server.held.values()].map(({ fileName }) => fileName)).toEqual(['fits.csv']),
    );
  });

  it("shows the server's own words when it refuses", async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    server.refusals.push({ status: 413, detail: 'The project holds 9 GiB of the 9 GiB it may hold' });
    const queue = queueOf();
    await send(queue, capture('a.csv'));
    await become(queue, 'failed');
    expect(item(queue).error).toMatchObject({
      status: 413,
      detail: 'The project holds 9 GiB of the 9 GiB it may hold',
    });
  });

  it('keeps what was left out on the list and sends nothing of it', async () => {
    const server = fakeUploadServer(projectId);
    server.serve();
    const queue = queueOf();
    const [added] = await queue.add([{ file: capture('a.cfg'), path: 'a.cfg' }]);
    queue.leaveOut(added?.id ?? 0, 'a.dat belongs to it');
    expect(queue.snapshot()).toMatchObject([{ state: 'left-out', reason: 'a.dat belongs to it' }]);
    expect(server.requests).toEqual([]);
    queue.forget(added?.id ?? 0);
    expect(queue.snapshot()).toEqual([]);
  });
});
