/** SHA-256 of a text (UTF-8) as 64 lower-case hex digits. Needs a secure context, as the whole offline side does. */
export async function sha256Hex(text: string): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text));
  return [...new Uint8Array(digest)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
