const KB = 1024

/** A number of bytes in words. */
export function sizeText(bytes: number): string {
  return bytes < KB * KB ? `${bytes / KB} kB` : `${bytes / KB / KB} MB`
}
