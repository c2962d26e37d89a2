/** Where the files of calibrations lie in storage: everything of one. */
export function calibrationPrefix(calibrationId: string): string {
  return `calibrations/${calibrationId}/`;
}

/** The certificate; the ending tells what kind of file it is. */
export function certificateKey(calibrationId: string, ending: string): string {
  return `${calibrationPrefix(calibrationId)}certificate.${ending}`;
}
