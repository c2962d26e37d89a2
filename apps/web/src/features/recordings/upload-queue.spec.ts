import type { Recording } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import type { Upload } from './api/upload-recording.js';
import { UploadQueue } from './upload-queue.js';

const file = (name: string) => new File(['t,u\n0,1\n'], name);
const options = {};

/** A sender whose uploads end when the test says so. */
function heldSender() {
  const open = new Map<string, { arrive: () => void; fail: (error: Error) => void }>();
  const send = (_projectId: string, { file: sent, signal }: Upload) =>
    new Promise<Recording>((resolve, reject) => {
      open.set(sent.name, { arrive: () => resolve({ name: sent.name } as Recording), fail: reject });
      signal.addEventListener('abort', () => reject(new DOMException('stopped', 'AbortError')));
    });
  return { open, send };
}

const states = (queue: UploadQueue) => queue.snapshot().map((item) => item.state);
const settled = () => new Promise((resolve) => setTimeout(resolve));

describe('upload queue', () => {
  it('sends two at a time and takes the next when one has arrived', async () => {
    const { open, send } = heldSender();
    const arrived: string[] = [];
    const queue = new UploadQueue('p', (recording) => arrived.push(recording.name), send);
    queue.add(['a.csv', 'b.csv', 'c.csv'].map((name) => ({ file: file(name), options })));
    expect(states(queue)).toEqual(['sending', 'sending', 'waiting']);
    open.get('a.csv')?.arrive();
    await settled();
    expect(states(queue)).toEqual(['done', 'sending', 'sending']);
    expect(arrived).toEqual(['a.csv']);
  });

  it('keeps a stopped upload stopped and goes on with the others', async () => {
    const { send } = heldSender();
    const queue = new UploadQueue('p', () => undefined, send);
    queue.add(['a.csv', 'b.csv', 'c.csv'].map((name) => ({ file: file(name), options })));
    queue.stop(1);
    await settled();
    expect(states(queue)).toEqual(['stopped', 'sending', 'sending']);
    queue.stopAll();
    await settled();
    expect(states(queue)).toEqual(['stopped', 'stopped', 'stopped']);
  });

  it('remembers a file that was left out and sends nothing of it', () => {
    const { open, send } = heldSender();
    const queue = new UploadQueue('p', () => undefined, send);
    queue.leaveOut(file('a.csv'));
    expect(states(queue)).toEqual(['left-out']);
    expect(open.size).toBe(0);
    queue.forget(1);
    expect(queue.snapshot()).toEqual([]);
  });

  it('says why an upload failed and sends it again on request', async () => {
    const { open, send } = heldSender();
    const queue = new UploadQueue('p', () => undefined, send);
    queue.add([{ file: file('a.csv'), options }]);
    open.get('a.csv')?.fail(new Error('too large'));
    await settled();
    expect(queue.snapshot()[0]).toMatchObject({ state: 'failed', error: new Error('too large') });
    queue.retry(1);
    expect(states(queue)).toEqual(['sending']);
    open.get('a.csv')?.arrive();
    await settled();
    queue.clear();
    expect(queue.snapshot()).toEqual([]);
  });
});
