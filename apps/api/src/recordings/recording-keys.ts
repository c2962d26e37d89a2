/** Where the files of recordings lie in storage. */

/** Sources are kept once per project and content. */
export function sourceKey(projectId: string, sha256: string): string {
  return `projects/${projectId}/sources/${sha256}`;
}

/** Everything computed from a recording. */
export function recordingPrefix(recordingId: string): string {
  return `recordings/${recordingId}/`;
}

/** Samples and pyramids of one reading, without the slash at the end. */
export function readPrefix(recordingId: string, readId: string): string {
  return `${recordingPrefix(recordingId)}reads/${readId}`;
}

/** Long arrays of one analysis, without the slash at the end. */
export function analysisPrefix(recordingId: string, analysisId: string): string {
  return `${recordingPrefix(recordingId)}analyses/${analysisId}`;
}
