/** Hands a file to the person through the browser's own download. */

export function saveBlob(blob: Blob, name: string): void {
  const link = document.createElement('a');
  link.href = URL.createObjectURL(blob);
  link.download = name;
  link.click();
  // The download has its own hold on the data once it has begun.
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
}

/** Text with a byte order mark, so that spreadsheets read it as UTF-8. */
export function saveText(text: string, name: string): void {
  saveBlob(new Blob(['\ufeff', text], { type: 'text/tab-separated-values;charset=utf-8' }), name);
}
