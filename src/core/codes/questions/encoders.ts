import { type EncoderEntry, encoderReport, type GradedForm } from '../encode/encoder-report.ts';
import { type Property, spaced } from '../properties.ts';
import type { AnswerTable, CodeQuestion } from './question.ts';

/** What is counted of a form: one, and several. */
const COUNTS = [
  ['xor2', 'XOR gate', 'XOR gates'],
  ['and2', 'AND gate', 'AND gates'],
  ['flipFlops', 'flip-flop', 'flip-flops'],
  ['romBits', 'stored bit', 'stored bits'],
  ['cycles', 'clock a word', 'clocks a word'],
] as const;

const countsText = (form: GradedForm): string =>
  COUNTS.filter(([count]) => form[count].value > 0)
    .map(([count, one, several]) => `${spaced(form[count].value)} ${form[count].value === 1 ? one : several}`)
    .join(', ');

/** Every encoder that the code has, with what it takes in gates and memory; and of each that it has not, why. */
export const encoders: CodeQuestion = {
  answer({ H }, { onProgress }) {
    const { encoders: entries } = encoderReport({ H }, { onProgress });
    return { lines: entries.flatMap(linesOf), table: tableOf(entries), list: listOf(entries) };
  },
};

function linesOf(entry: EncoderEntry): Property[] {
  const { kind, title } = entry;
  if (!entry.available) {
    const grade = entry.proved ? 'proved' : 'bounded';
    const text = entry.proved ? 'none' : 'none found';
    return [{ key: `encoder-${kind}`, label: title, text, grade, method: entry.reason }];
  }
  const { details, wordsChecked, source } = entry;
  const told = details.map(({ label, text }) => `${label.toLowerCase()}: ${text}`);
  const checked = `${wordsChecked} random words encoded and checked`;
  return entry.forms.map((form, at) => ({
    key: `encoder-${kind}-${at + 1}`,
    label: `${title}: ${form.form}`,
    text: countsText(form),
    number: form.xor2.value,
    grade: form.xor2.grade,
    method: [form.xor2.method, ...(at === 0 ? [...told, checked] : [])].join('; '),
    ...(at === 0 && { source }),
  }));
}

const formsOf = (entries: readonly EncoderEntry[]): { title: string; form: GradedForm }[] =>
  entries.flatMap((entry) => (entry.available ? entry.forms.map((form) => ({ title: entry.title, form })) : []));

function tableOf(entries: readonly EncoderEntry[]): AnswerTable {
  return {
    of: 'Gates of two inputs, flip-flops, stored bits and clocks of each form, all counted on this code',
    columns: ['Encoder', 'Form', ...COUNTS.map(([, , several]) => several)],
    rows: formsOf(entries).map(({ title, form }) => [title, form.form, ...COUNTS.map(([count]) => form[count].value)]),
  };
}

function listOf(entries: readonly EncoderEntry[]) {
  const head = ['encoder', 'form', 'xor2', 'and2', 'flip_flops', 'stored_bits', 'clocks'];
  const rows = formsOf(entries).map(({ title, form }) => [
    title,
    form.form,
    ...COUNTS.map(([count]) => form[count].value),
  ]);
  return { fileName: 'encoders.csv', text: [head, ...rows].map((row) => `${row.join(',')}\n`).join('') };
}
