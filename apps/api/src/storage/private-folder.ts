import { chmod, mkdir } from 'node:fs/promises';

/** Makes a folder that other accounts of the machine cannot enter; one that is there is closed to them. */
export async function makePrivateFolder(path: string): Promise<void> {
  await mkdir(path, { recursive: true });
  await chmod(path, 0o700);
}
