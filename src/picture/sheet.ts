// A sheet of paper as an SVG document: sizes in points, so that a font size is what print shows;
// title and description for screen readers; words measured by a bound that holds for common fonts.
import { type BaseType, type Selection, select } from 'd3';
import { DOMParser } from 'linkedom';
import { cleanText } from '../export/xml.js';
import { ink, page } from './palette.js';

/** An element of a picture that more can be appended to. */
export type Drawn = Selection<BaseType, unknown, null, undefined>;

/** A sheet; `scale` enlarges titles and legends with the paper. */
export interface Paper {
  readonly name: string;
  readonly width: number;
  readonly height: number;
  readonly millimetres: readonly [number, number];
  readonly scale: number;
}

export type Orientation = 'landscape' | 'portrait';

const longSides: readonly [string, number, number, number][] = [
  ['A4', 210, 297, 1],
  ['A3', 297, 420, 1.25],
  ['A2', 420, 594, 1.6],
  ['A1', 594, 841, 2],
];

/** ISO 216 sheets from A4 up; all have one aspect, so any of them prints on A4, smaller. */
export function papers(orientation: Orientation): Paper[] {
  return longSides.map(([name, short, long, scale]) => {
    const millimetres =
      orientation === 'landscape' ? ([long, short] as const) : ([short, long] as const);
    const [width, height] = millimetres.map((mm) => Math.round((mm * 72) / 25.4));
    return { name, width, height, millimetres, scale };
  });
}

export const sansFont = "'DejaVu Sans', 'Segoe UI', 'Helvetica Neue', Arial, sans-serif";
export const signFont = "'DejaVu Sans Mono', Menlo, Consolas, 'Liberation Mono', monospace";

/** Advance of a character of `signFont`, in ems; no common monospaced font is wider. */
export const signAdvance = 0.61;

/**
 * An upper estimate of the width of a text in `sansFont`, in ems: advances of DejaVu Sans, the widest
 * of the list, rounded up by class of letter; ideographs and pictures fill a square.
 */
export function textWidth(text: string): number {
  let width = 0;
  for (const character of text) {
    const code = character.codePointAt(0)!;
    if (code >= 0x1100) width += 1.05;
    else if (/[MWmw@%—…+=<>~^#&]/.test(character)) width += 1;
    else if (/[ijlft.,:;'|()]/.test(character)) width += 0.42;
    else if (character === ' ') width += 0.33;
    else width += /[a-z0-9-]/.test(character) ? 0.64 : 0.78;
  }
  return width;
}

/** The text, cut with an ellipsis where it would be wider than `width` at this font size. */
export function fitText(text: string, width: number, fontSize: number): string {
  const clean = cleanText(text).replace(/\s+/g, ' ').trim();
  if (textWidth(clean) * fontSize <= width) return clean;
  const characters = Array.from(clean);
  let used = textWidth('…');
  let kept = 0;
  while (kept < characters.length && (used + textWidth(characters[kept])) * fontSize <= width) {
    used += textWidth(characters[kept++]);
  }
  return `${characters.slice(0, kept).join('').trimEnd()}…`;
}

/** Words broken into lines no wider than `width`. */
export function wrapText(text: string, width: number, fontSize: number): string[] {
  const lines: string[] = [];
  let current = '';
  for (const word of text.split(' ')) {
    const longer = current === '' ? word : `${current} ${word}`;
    if (current !== '' && textWidth(longer) * fontSize > width) {
      lines.push(current);
      current = word;
    } else current = longer;
  }
  return current === '' ? lines : [...lines, current];
}

/** A coordinate with two decimals at most: a hundredth of a point is below any printer's dot. */
export function round(x: number): number {
  return Math.round(x * 100) / 100 + 0;
}

/** A document with title and description, white throughout; `text` turns it into SVG. */
export function startSheet(
  paper: Paper,
  words: { readonly title: string; readonly description: string; readonly idPrefix: string },
): { readonly svg: Drawn; text(): string } {
  const document = new DOMParser().parseFromString(
    '<svg xmlns="http://www.w3.org/2000/svg"></svg>',
    'image/svg+xml',
  );
  const svg: Drawn = select<BaseType, unknown>(document.documentElement as unknown as BaseType);
  const [titleId, descriptionId] = [`${words.idPrefix}-title`, `${words.idPrefix}-description`];
  svg
    .attr('width', `${paper.millimetres[0]}mm`)
    .attr('height', `${paper.millimetres[1]}mm`)
    .attr('viewBox', `0 0 ${paper.width} ${paper.height}`)
    .attr('role', 'img')
    .attr('aria-labelledby', `${titleId} ${descriptionId}`)
    .attr('font-family', sansFont)
    .attr('fill', ink);
  svg.append('title').attr('id', titleId).text(cleanText(words.title));
  svg.append('desc').attr('id', descriptionId).text(cleanText(words.description));
  svg.append('rect').attr('width', paper.width).attr('height', paper.height).attr('fill', page);
  return {
    svg,
    // Markup inside text and attributes is escaped, so "><" only stands between two elements.
    text: () => `${document.toString().replaceAll('><', '>\n<')}\n`,
  };
}
