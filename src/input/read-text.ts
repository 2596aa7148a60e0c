// The text form: a normal a line, numbers separated by blanks or commas, `#` starts a comment, an
// optional label first, ended by a colon. Above the first normal two comments are read, `# title: ...`
// and `# coordinates: x, y, z`; every other comment is for people only.
import type { GeneratorList } from './generators.js';
import { cleanName, isName, ListBuilder } from './list-builder.js';
import type { SourceText } from './source.js';

/** Reads a list in the text form; throws InputError. */
export function readText(source: SourceText): GeneratorList {
  const builder = new ListBuilder();
  const said = new Map<string, string>();
  let started = false;
  for (const match of source.text.matchAll(/[^\r\n]+/g)) {
    const comment = match[0].indexOf('#');
    const line = comment < 0 ? match[0] : match[0].slice(0, comment);
    if (line.trim() !== '') {
      readLine(line, match.index, source, builder);
      started = true;
    } else if (!started) {
      const [, key, text] = /^\s*#\s*(title|coordinates):(.*)$/u.exec(match[0]) ?? [];
      if (key !== undefined && !said.has(key)) said.set(key, text!.trim());
    }
  }
  const list = builder.finish(null, null, source);
  const title = said.get('title') ?? '';
  return {
    ...list,
    title: isName(title) ? title : null,
    coordinates: namesIn(said.get('coordinates') ?? '', list.normals[0]!.length),
  };
}

/** Names separated by commas; null, as a comment is never at fault, unless there are `length`. */
function namesIn(text: string, length: number): readonly string[] | null {
  const names = text.split(',').map((name) => name.trim());
  const sound = names.length === length && new Set(names).size === length && names.every(isName);
  return sound ? names : null;
}

function readLine(line: string, start: number, source: SourceText, builder: ListBuilder): void {
  // The last colon: labels may have colons, numbers never do.
  const colon = line.lastIndexOf(':');
  const lead = line.length - line.trimStart().length;
  const place = (offset = lead) => source.place(start + offset);
  const label = colon < 0 ? null : cleanName(line.slice(0, colon), place);
  if (colon >= 0 && label === null) {
    throw source.fault(
      start + colon,
      'a colon without a label',
      'write a label before the colon, or no colon',
    );
  }
  const entries = [];
  const tokens = /[^\s,]+|,/g;
  tokens.lastIndex = colon + 1;
  let afterComma = false;
  for (let token = tokens.exec(line); token !== null; token = tokens.exec(line)) {
    const at = token.index;
    if (token[0] !== ',') {
      entries.push(builder.number(token[0], (offset = 0) => place(at + offset)));
      afterComma = false;
    } else if (afterComma || entries.length === 0) {
      throw source.fault(
        start + at,
        'a comma with no number before it',
        'write 0, or take the comma out',
      );
    } else afterComma = true;
  }
  if (afterComma) {
    const end = start + line.trimEnd().length - 1;
    throw source.fault(end, 'a comma with no number after it', 'write 0, or take the comma out');
  }
  if (entries.length === 0) {
    throw source.fault(
      start + colon,
      'a label without numbers',
      'write the normal after the colon',
    );
  }
  builder.add({ entries, label, range: null, place });
}
