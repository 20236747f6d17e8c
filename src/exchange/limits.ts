/** What a worksheet file may be at most, beside the limits of the worksheet in it. Beyond them it is refused unread. */

/** Size of the file in bytes: 32 MiB. */
export const FILE_BYTES_LIMIT = 32 * 1024 * 1024;
/** Nesting of brackets in the JSON text. */
export const NESTING_LIMIT = 64;
