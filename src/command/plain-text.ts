/** Text from a file as it may stand in a line of a terminal or a list. */

// Line breaks, control characters (terminals obey some of them) and the marks that turn the direction of writing.
const UNPRINTABLE = /[\p{Cc}\p{Zl}\p{Zp}\u202a-\u202e\u2066-\u2069]+/gu;

/** The text on one line, with a blank in place of whatever breaks lines or is not printed. */
export function oneLine(text: string): string {
  return text.replace(UNPRINTABLE, ' ');
}
