const KB = 1024;
const MB = KB * KB;

/** A size of a file, short: `640 KB`, `3.4 MB`, `25 MB`. A kilobyte is 1024 bytes here. */
export function sayBytes(bytes: number): string {
  if (bytes < KB) return `${bytes} bytes`;
  if (bytes < MB) return `${Math.round(bytes / KB)} KB`;
  const megabytes = bytes / MB;
  return `${megabytes < 10 ? megabytes.toFixed(1) : Math.round(megabytes)} MB`;
}

/** How far it is, both in the unit of the whole: `1.2 of 3.4 MB`. */
export function sayBytesOf(done: number, total: number): string {
  if (total < MB) return `${Math.round(done / KB)} of ${Math.round(total / KB)} KB`;
  return `${(done / MB).toFixed(1)} of ${(total / MB).toFixed(1)} MB`;
}
