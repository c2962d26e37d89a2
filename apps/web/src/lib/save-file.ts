/** Offers text as a download. */
export function saveText(fileName: string, text: string, type = 'text/csv;charset=utf-8'): void {
  saveBlob(fileName, new Blob([text], { type }));
}

/** Offers bytes as a download. */
export function saveBytes(fileName: string, bytes: Uint8Array<ArrayBuffer>, type: string): void {
  saveBlob(fileName, new Blob([bytes], { type }));
}

function saveBlob(fileName: string, blob: Blob): void {
  const url = URL.createObjectURL(blob);
  const anchor = document.createElement('a');
  anchor.href = url;
  anchor.download = fileName;
  anchor.click();
  URL.revokeObjectURL(url);
}
