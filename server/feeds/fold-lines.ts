const LONGEST_LINE_OCTETS = 75;

/**
 * Folds content lines as RFC 5545 section 3.1 asks: no line, its leading space counted, is longer than 75 octets of UTF-8, and no
 * character is split. Lines end in CRLF before and after.
 */
export function foldLines(text: string): string {
  return text
    .split('\r\n')
    .map((line) => (line.length * 3 <= LONGEST_LINE_OCTETS ? line : foldLine(line)))
    .join('\r\n');
}

function foldLine(line: string): string {
  let folded = '';
  let from = 0;
  let octets = 0;
  for (let at = 0; at < line.length;) {
    const point = line.codePointAt(at) ?? 0;
    const width = utf8Octets(point);
    if (octets + width > LONGEST_LINE_OCTETS) {
      folded += `${line.slice(from, at)}\r\n `;
      from = at;
      octets = 1;
    }
    octets += width;
    at += point > 0xffff ? 2 : 1;
  }
  return folded + line.slice(from);
}

function utf8Octets(point: number): number {
  if (point < 0x80) return 1;
  if (point < 0x800) return 2;
  return point < 0x10000 ? 3 : 4;
}
