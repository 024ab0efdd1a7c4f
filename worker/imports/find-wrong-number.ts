interface NumberToken {
  readonly token: string;
  readonly textRow: number;
  readonly field: string | null;
}

const wrongNumber = /-?(?:NaN|Infinity)\b/y;

/** End of the JSON string that opens at `start`: the index after its closing quote. */
function endOfString(text: string, start: number): number {
  let index = start + 1;
  while (index < text.length && text[index] !== '"') index += text[index] === '\\' ? 2 : 1;
  return index + 1;
}

/**
 * The first NaN or Infinity that stands in JSON text as if it were a number, with the key before it. Many programs write
 * them, JSON does not know them, and the parser's own message names neither the key nor the line.
 */
export function findWrongNumber(text: string): NumberToken | null {
  let field: string | null = null;
  let textRow = 1;
  let index = 0;
  while (index < text.length) {
    const character = text[index];
    if (character === '"') {
      const end = endOfString(text, index);
      if (/^\s*:/.test(text.slice(end, end + 20))) field = text.slice(index + 1, end - 1);
      index = end;
      continue;
    }
    if (character === '\n') textRow += 1;
    wrongNumber.lastIndex = index;
    const found = wrongNumber.exec(text);
    if (found !== null) return { token: found[0], textRow, field };
    index += 1;
  }
  return null;
}
