/** A file's bytes as base64, in pieces so that a large file does not overflow the call stack. */
export async function readBase64(file: Blob): Promise<string> {
  const bytes = new Uint8Array(await file.arrayBuffer());
  const piece = 0x8000;
  let text = '';
  for (let at = 0; at < bytes.length; at += piece) text += String.fromCharCode(...bytes.subarray(at, at + piece));
  return btoa(text);
}
