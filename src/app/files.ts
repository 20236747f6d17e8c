/** Files in and out of the browser: saving a text or a picture as a download, choosing a file, reading a dropped one. */

/** Offers a text as a download under this name. */
export function downloadText(name: string, text: string, type = 'application/json'): void {
  downloadBlob(name, new Blob([text], { type }));
}

/** Offers bytes as a download under this name. */
export function downloadBlob(name: string, blob: Blob): void {
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser has taken the blob by then; a minute covers slow disks and questions to the user.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}

/** Lets the person choose a file; null when none was chosen. */
export function chooseFile(accept: string): Promise<File | null> {
  const input = document.createElement('input');
  input.type = 'file';
  input.accept = accept;
  return new Promise((resolve) => {
    input.addEventListener('change', () => resolve(input.files?.[0] ?? null));
    input.addEventListener('cancel', () => resolve(null));
    input.click();
  });
}
