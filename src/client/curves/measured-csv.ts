import { parse } from 'csv-parse/browser/esm/sync';
import type { MeasuredPoint } from '@/api/measurements.ts';
import { hardCrossover } from '@/core/channels/awgn.ts';

/** What a column of the file can stand for. */
export type Role = 'p' | 'ebn0' | 'frames' | 'frameErrors' | 'fer' | 'bitErrors' | 'ber' | 'none';

export interface Sheet {
  heads: string[];
  rows: string[][];
}

const MOST_ROWS = 1000;

/** The cells of a CSV file, its first line as heads; parted by comma, semicolon or tab, whichever the first line has.
 *  @throws Error with the line that cannot be read. */
export function readSheet(text: string): Sheet {
  const first = text.slice(0, text.search(/[\r\n]|$/));
  const delimiter = [';', '\t', ','].find((mark) => first.includes(mark)) ?? ',';
  const records = parse(text, {
    delimiter,
    bom: true,
    skip_empty_lines: true,
    trim: true,
    comment: '#',
    comment_no_infix: true,
  }) as string[][];
  const [heads, ...rows] = records;
  if (!heads || rows.length === 0)
    throw new Error('The file needs a line of column names and at least one line of figures.');
  if (rows.length > MOST_ROWS)
    throw new Error(`The file has ${rows.length} lines; at most ${MOST_ROWS} points are taken.`);
  return { heads, rows };
}

const names: readonly (readonly [Role, RegExp])[] = [
  ['bitErrors', /^(bit[ _-]?err(or)?s?)$/i],
  ['ber', /^(ber|bit[ _-]?error[ _-]?rate)$/i],
  ['frameErrors', /^((frame|block|word|packet)[ _-]?err(or)?s?|failures?|errors)$/i],
  ['fer', /^(fer|bler|wer|(frame|block|word)[ _-]?error[ _-]?rate)$/i],
  ['frames', /^(frames|blocks|words|packets|trials|frame[ _-]?count)$/i],
  ['ebn0', /^e_?b\s*\/?\s*n_?0.*$/i],
  ['p', /^(p|raw( bit)? error rate|rber|crossover.*|flip.*)$/i],
];

/** What the heads say, each role once. */
export function proposedRoles(heads: readonly string[]): Role[] {
  const taken = new Set<Role>();
  return heads.map((head) => {
    const role = names.find(([, pattern]) => pattern.test(head.trim()))?.[0] ?? 'none';
    if (taken.has(role)) return 'none';
    if (role !== 'none') taken.add(role);
    return role;
  });
}

export type Reading = { points: MeasuredPoint[] } | { problem: string };

/** The points of a sheet whose columns have roles. A rate is turned into the nearest count, and refused when the digits it
 *  was written with allow none. */
export function pointsOf(sheet: Sheet, roles: readonly Role[], { n, k }: { n: number; k: number }): Reading {
  const at = (role: Role) => roles.indexOf(role);
  const twice = roles.find((role, i) => role !== 'none' && roles.indexOf(role) !== i);
  if (twice) return { problem: `Two columns are said to be ${roleText[twice]}; one is.` };
  if (at('p') < 0 === at('ebn0') < 0) return { problem: 'One column must be p, or Eb/N0 in dB, and not both.' };
  if (at('frames') < 0) return { problem: 'One column must count the frames: a rate without counts has no interval.' };
  if (at('frameErrors') < 0 && at('fer') < 0)
    return { problem: 'One column must be frame errors, or the frame error rate.' };
  const points: MeasuredPoint[] = [];
  for (const [i, row] of sheet.rows.entries()) {
    const point = pointOf(row, at, { n, k });
    if (typeof point === 'string') return { problem: `Line ${i + 2}: ${point}` };
    points.push(point);
  }
  return { points };
}

export const roleText: Record<Role, string> = {
  p: 'crossover probability p',
  ebn0: 'Eb/N0 in dB, hard decisions',
  frames: 'frames',
  frameErrors: 'frame errors',
  fer: 'frame error rate',
  bitErrors: 'bit errors',
  ber: 'bit error rate',
  none: 'not used',
};

function pointOf(
  row: readonly string[],
  at: (role: Role) => number,
  { n, k }: { n: number; k: number },
): MeasuredPoint | string {
  const cell = (role: Role) => row[at(role)]?.trim() ?? '';
  const number = (role: Role) =>
    /^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i.test(cell(role)) ? Number(cell(role)) : Number.NaN;
  const bad = (role: Role, accepted: string) => `${roleText[role]}: got “${cell(role)}”; accepted is ${accepted}.`;
  const frames = number('frames');
  if (!Number.isInteger(frames) || frames < 1) return bad('frames', 'a whole number from 1');
  const onAxis = axisOf(at('p') >= 0 ? number('p') : null, at('ebn0') >= 0 ? number('ebn0') : null, k / n);
  if (!onAxis)
    return at('p') >= 0
      ? bad('p', 'a probability above 0 and at most 0.5')
      : bad('ebn0', 'a ratio in dB from −20 to 40');
  const frameErrors = at('frameErrors') >= 0 ? number('frameErrors') : countOf(number('fer'), frames, cell('fer'));
  const errorRole: Role = at('frameErrors') >= 0 ? 'frameErrors' : 'fer';
  if (!Number.isInteger(frameErrors) || frameErrors < 0 || frameErrors > frames)
    return bad(
      errorRole,
      errorRole === 'fer'
        ? 'a rate that is a whole number of frame errors over the frames'
        : 'a whole number up to the frames',
    );
  const given = at('bitErrors') >= 0 || at('ber') >= 0;
  const bitErrors = !given
    ? null
    : at('bitErrors') >= 0
      ? number('bitErrors')
      : countOf(number('ber'), frames * n, cell('ber'));
  if (bitErrors !== null && !(Number.isInteger(bitErrors) && bitErrors >= frameErrors && bitErrors <= frameErrors * n))
    return bad(at('bitErrors') >= 0 ? 'bitErrors' : 'ber', `from 1 to n = ${n} wrong bits a frame error`);
  return { ...onAxis, frames, frameErrors, bitErrors };
}

function axisOf(p: number | null, ebn0Db: number | null, rate: number): Pick<MeasuredPoint, 'p' | 'ebn0Db'> | null {
  if (p !== null) return p > 0 && p <= 0.5 ? { p } : null;
  if (ebn0Db === null || !(ebn0Db >= -20 && ebn0Db <= 40) || rate <= 0) return null;
  return { p: hardCrossover(ebn0Db, rate), ebn0Db };
}

/** rate · of as a whole number, when the rate's own digits allow just one; NaN otherwise. */
function countOf(rate: number, of: number, text: string): number {
  const count = Math.round(rate * of);
  const digits = text.replace(/e.*$/i, '').replace(/[^\d]/g, '').replace(/^0+/, '').length;
  const slack = Math.max(1e-9, 0.5 * 10 ** -Math.max(0, digits - 1)) * Math.max(1, rate * of);
  return rate >= 0 && Math.abs(count - rate * of) <= slack + 1e-9 ? count : Number.NaN;
}
