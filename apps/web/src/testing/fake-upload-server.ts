import { createHash } from 'node:crypto';
import { uploadOutcomeSchema, type UploadLimits } from '@overtally/contracts';
import { vi } from 'vitest';
import { json, mockApi, page, problem } from './mock-api.js';
import { sampleId, sampleRecording } from './samples.js';

interface Held {
  id: string;
  fileName: string;
  sizeBytes: number;
  bytes: Uint8Array;
}

/** How the next request that carries bytes goes. */
export type Fate = 'arrives' | 'hangs' | 'breaks-off' | 'breaks-off-halfway';

/**
 * A server of tus 1.0 (https://tus.io/protocols/resumable-upload: core, creation, termination) and of the routes
 * around it, in memory, in place of XMLHttpRequest and fetch. What each PATCH brings is kept as it came.
 */
export function fakeUploadServer(projectId: string, limits: Partial<UploadLimits> = {}) {
  const held = new Map<string, Held>();
  const requests: string[] = [];
  const fates: Fate[] = [];
  const hanging: (() => void)[] = [];
  const refusals: { status: number; detail: string }[] = [];
  const root = `/api/projects/${projectId}/uploads`;
  let nextId = 1;

  class FakeXhr {
    readonly upload: { onprogress?: (event: { lengthComputable: boolean; loaded: number }) => void } = {};
    onload?: () => void;
    onerror?: (error: Error) => void;
    status = 0;
    responseText = '';
    private method = '';
    private path = '';
    private aborted = false;
    private readonly headers = new Headers();
    private readonly answers = new Headers();

    open(method: string, url: string) {
      this.method = method;
      this.path = new URL(url, location.origin).pathname;
    }
    setRequestHeader(name: string, value: string) {
      this.headers.set(name, value);
    }
    getResponseHeader(name: string) {
      return this.answers.get(name);
    }
    abort() {
      this.aborted = true;
    }
    send(body: Blob | null) {
      requests.push(`${this.method} ${this.path}`);
      void this.answer(body);
    }

    private end(status: number, headers: Record<string, string> = {}) {
      if (this.aborted) return;
      this.status = status;
      for (const [name, value] of Object.entries(headers)) this.answers.set(name, value);
      this.onload?.();
    }

    private async answer(body: Blob | null): Promise<void> {
      await Promise.resolve();
      if (this.headers.get('tus-resumable') !== '1.0.0') return this.end(412);
      if (this.method === 'POST') return this.create();
      const upload = held.get(this.path.slice(root.length + 1));
      if (!upload) return this.end(404);
      const offset = String(upload.bytes.length);
      if (this.method === 'HEAD')
        return this.end(200, { 'upload-offset': offset, 'upload-length': String(upload.sizeBytes) });
      if (this.method === 'DELETE') {
        held.delete(upload.id);
        return this.end(204);
      }
      if (this.headers.get('upload-offset') !== offset) return this.end(409);
      const chunk = new Uint8Array(await (body ?? new Blob()).arrayBuffer());
      const fate = fates.shift() ?? 'arrives';
      const came =
        fate === 'arrives' ? chunk : chunk.subarray(0, fate === 'breaks-off' ? 0 : chunk.length / 2);
      upload.bytes = new Uint8Array([...upload.bytes, ...came]);
      this.upload.onprogress?.({ lengthComputable: true, loaded: came.length });
      if (fate === 'hangs') return void hanging.push(() => this.onerror?.(new Error('cut')));
      if (fate !== 'arrives') return this.onerror?.(new Error('cut'));
      this.end(204, { 'upload-offset': String(upload.bytes.length) });
    }

    private create(): void {
      const refusal = refusals.shift();
      if (refusal) {
        this.responseText = JSON.stringify({ type: 'about:blank', title: 'Refused', ...refusal });
        return this.end(refusal.status, { 'content-type': 'application/problem+json' });
      }
      const id = sampleId(700 + nextId++);
      const [, name = ''] = /filename ([^,]+)/.exec(this.headers.get('upload-metadata') ?? '') ?? [];
      const sizeBytes = Number(this.headers.get('upload-length'));
      held.set(id, { id, sizeBytes, fileName: atob(name), bytes: new Uint8Array() });
      // Relative to the address of the request (RFC 9110, 10.2.2).
      this.end(201, { location: `uploads/${id}` });
    }
  }
  vi.stubGlobal('XMLHttpRequest', FakeXhr);

  const unfinished = () => page([...held.values()].map((upload) => present(upload)));
  const finish = (id: string) => (request: { body: unknown; path: string; method: string }) => {
    const upload = held.get(id);
    const { sha256 } = request.body as { sha256?: string };
    const arrived = createHash('sha256')
      .update(upload?.bytes ?? '')
      .digest('hex');
    held.delete(id);
    if (sha256 !== arrived)
      return problem(422, { code: 'checksum-mismatch', detail: `What arrived has the SHA-256 ${arrived}` })(
        request,
      );
    const recording = sampleRecording({ file: { name: upload?.fileName ?? '', size: 1, sha256: arrived } });
    return json(uploadOutcomeSchema.parse({ items: [recording], leftOut: [] }), 202)(request);
  };
  const answers = {
    [`GET /projects/${projectId}/upload-limits`]: json({
      ...{ maxFileBytes: 1000, quotaBytes: null, usedBytes: 0 },
      ...limits,
    }),
    [`GET /projects/${projectId}/uploads`]: (request: Parameters<ReturnType<typeof page>>[0]) =>
      unfinished()(request),
    ...Object.fromEntries(
      [1, 2, 3, 4, 5].map((n) => {
        const id = sampleId(700 + n);
        return [`POST /projects/${projectId}/uploads/${id}/recordings`, finish(id)];
      }),
    ),
  };
  return {
    held,
    /** Method and path of what was asked of the upload protocol. */
    requests,
    /** What becomes of the next requests that carry bytes; they arrive when nothing is said. */
    fates,
    /** Why the next uploads are not begun. */
    refusals,
    /** Cuts the connections of requests that hang. */
    cut: () => hanging.splice(0).forEach((end) => end()),
    answers,
    /** The routes around the protocol, and others that a test needs. */
    serve: (others: Parameters<typeof mockApi>[0] = {}) => mockApi({ ...answers, ...others }),
  };
}

const present = ({ id, fileName, sizeBytes, bytes }: Held) => ({
  ...{ id, fileName, sizeBytes, receivedBytes: bytes.length },
  createdAt: '2026-11-26T13:20:00Z',
  expiresAt: '2026-12-03T13:20:00Z',
});
