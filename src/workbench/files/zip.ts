const DIRECTORY_ENTRY = 0x02014b50;
const END_OF_DIRECTORY = 0x06054b50;
const DEFLATED = 8;

/** A file in a zip file. */
export interface Entry {
  readonly name: string;
  /** Its text, read when asked for. */
  readonly text: () => Promise<string>;
}

/** What the directory at the end of a zip file lists (APPNOTE.TXT, 4.3.7, 4.3.12 and 4.3.16). */
export function zipEntries(bytes: Uint8Array): Entry[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let end = bytes.length - 22;
  while (end >= 0 && view.getUint32(end, true) !== END_OF_DIRECTORY) end--;
  if (end < 0) return [];
  const entries: Entry[] = [];
  let at = view.getUint32(end + 16, true);
  while (at + 46 <= end && view.getUint32(at, true) === DIRECTORY_ENTRY) {
    const length = view.getUint16(at + 28, true);
    const isDeflated = view.getUint16(at + 10, true) === DEFLATED;
    const size = view.getUint32(at + 20, true);
    const head = view.getUint32(at + 42, true);
    const text = (): Promise<string> => {
      const start = head + 30 + view.getUint16(head + 26, true) + view.getUint16(head + 28, true);
      return inflated(bytes.subarray(start, start + size), isDeflated);
    };
    entries.push({ name: new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + length)), text });
    at += 46 + length + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  return entries;
}

async function inflated(body: Uint8Array, isDeflated: boolean): Promise<string> {
  const blob = new Blob([body as BlobPart]);
  return isDeflated ? new Response(blob.stream().pipeThrough(new DecompressionStream('deflate-raw'))).text() : blob.text();
}
