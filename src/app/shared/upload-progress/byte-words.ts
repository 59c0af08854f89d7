/** Bytes as people read them, in powers of ten: `640 kB`, `4.2 MB`, `120 MB`. */
export function byteWords(sizeBytes: number): string {
  if (sizeBytes < 1_000_000) return `${Math.round(sizeBytes / 1_000)} kB`;
  const mega = sizeBytes / 1_000_000;
  return `${mega < 10 ? mega.toFixed(1) : Math.round(mega)} MB`;
}
