import { Agent } from 'node:http';
import { DefaultHttpStack, Upload, type UploadOptions } from 'tus-js-client';

type Options = Partial<UploadOptions> & {
  endpoint: string;
  cookie: string;
  fileName: string;
  /** Cuts the connection once so many bytes have been handed over. */
  cutAtBytes?: number;
};

/**
 * Sends bytes by tus-js-client, an implementation of tus 1.0 of others.
 * @returns the address of the upload
 */
export async function sendByTus(
  bytes: Buffer,
  { endpoint, cookie, fileName, cutAtBytes, ...options }: Options,
): Promise<string> {
  return new Promise((resolve, reject) => {
    const upload = new Upload(bytes, {
      endpoint,
      headers: { cookie },
      metadata: { filename: fileName },
      retryDelays: null,
      // A connection of an earlier upload may have been closed meanwhile.
      httpStack: new DefaultHttpStack({ agent: new Agent({ keepAlive: false }) }),
      ...options,
      onProgress: (sent) => {
        if (cutAtBytes === undefined || sent < cutAtBytes || upload.url === null) return;
        void upload.abort().then(() => resolve(upload.url!));
      },
      onSuccess: () => resolve(upload.url!),
      onError: reject,
    });
    upload.start();
  });
}
