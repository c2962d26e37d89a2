import type { UploadLimits } from '@overtally/contracts';
import { ApiProblem } from '../../../lib/api-problem.js';
import { formatBytes } from '../../../lib/format.js';

/**
 * Why a file cannot come into the project, before any of it is sent; null where it can. `aheadBytes` are those of
 * the files that are under way.
 */
export function refusalOf(file: File, limits: UploadLimits, aheadBytes: number): ApiProblem | null {
  const { maxFileBytes, quotaBytes, usedBytes } = limits;
  if (file.size > maxFileBytes) {
    return refused(
      'file-too-large',
      `the file has ${formatBytes(file.size)}, the limit is ${formatBytes(maxFileBytes)}. Cut the capture, or ask your administrator.`,
    );
  }
  if (quotaBytes === null || usedBytes + aheadBytes + file.size <= quotaBytes) return null;
  const ahead = aheadBytes > 0 ? ` and ${formatBytes(aheadBytes)} more are under way` : '';
  return refused(
    'quota-exceeded',
    `the project holds ${formatBytes(usedBytes)} of its ${formatBytes(quotaBytes)}${ahead}; ${formatBytes(file.size)} do not fit. Remove recordings that are no longer needed, or ask your administrator.`,
  );
}

const refused = (code: string, detail: string) =>
  new ApiProblem({ status: 413, code, title: 'The file does not fit', detail });
