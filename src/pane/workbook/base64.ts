/** Bytes as Base64, in pieces, since a call takes only so many arguments. */
const PIECE = 32_766;

export function toBase64(bytes: Uint8Array): string {
  let text = "";
  for (let from = 0; from < bytes.length; from += PIECE)
    text += btoa(String.fromCharCode(...bytes.subarray(from, from + PIECE)));
  return text;
}
