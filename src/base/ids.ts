/** Identifiers: worksheets carry a UUID, lines and sections a short id unique within the worksheet. */

/** A random version-4 UUID (RFC 9562). */
export function newUuid(): string {
  return crypto.randomUUID();
}

/** A short random id, unique within a worksheet for all practical purposes (48 random bits), of letters and digits. */
export function newShortId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(6));
  return Array.from(bytes, (byte) => byte.toString(36).padStart(2, '0')).join('');
}
