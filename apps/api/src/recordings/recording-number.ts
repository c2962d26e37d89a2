/** Number of a recording as people write it: R-0001. */
export function recordingNumber(number: number): string {
  return `R-${String(number).padStart(4, '0')}`;
}
