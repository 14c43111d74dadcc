const WIDTH = 96;

/** Break a text between words so that no line is longer than 96 letters; the lines after the first are indented. */
export function wrap(text: string, indent: number): string {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    if (line && indent + line.length + 1 + word.length > WIDTH) {
      lines.push(line);
      line = word;
    } else {
      line = line ? `${line} ${word}` : word;
    }
  }
  return [...lines, line].join(`\n${' '.repeat(indent)}`);
}
