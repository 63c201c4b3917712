import type { DesignSpec } from '../designs/block-design.ts';
import { families, familyById } from '../designs/families/index.ts';
import type { DesignPrediction } from '../designs/family.ts';
import { CatalogueColumns } from './columns.ts';
import { type Entry, entryOf } from './entry.ts';
import { keptClassEntries, keptClassEntry } from './kept-classes.ts';

/** Longest code in the catalogue. */
export const MAX_CATALOGUE_LENGTH = 70_000;

/** Most blocks of a design that is listed for the code on its points. */
const MAX_CATALOGUE_BLOCKS = 300_000;

/** Operations that name codes which are listed already: a dual is the other orientation, kept classes are a choice made
 *  for every resolvable family, and relabelled points permute the bits. */
const REPEATING = new Set(['dual', 'classes', 'relabel']);

let table: CatalogueColumns | undefined;

/** The catalogue of everything the families can enumerate, made once. */
export function catalogueTable(): CatalogueColumns {
  table ??= makeTable();
  return table;
}

function makeTable(): CatalogueColumns {
  const made = new CatalogueColumns(entryAgain);
  for (const family of families) {
    if (REPEATING.has(family.id)) continue;
    for (const params of family.enumerate({ maxPoints: MAX_CATALOGUE_LENGTH, maxBlocks: MAX_CATALOGUE_BLOCKS })) {
      const design = { family: family.id, params: params as DesignSpec['params'] };
      const prediction = family.predict(params);
      for (const code of prediction.codes)
        if (code.n <= MAX_CATALOGUE_LENGTH) made.add(entryOf(design, prediction, code));
      for (const entry of keptClassEntries(design, prediction, MAX_CATALOGUE_LENGTH)) made.add(entry);
    }
  }
  return made;
}

/** Predictions of designs lately shown; one design has up to hundreds of entries, and some ranks take long. */
const lately = new Map<DesignSpec, DesignPrediction>();
const MOST_HELD = 2000;

function predictAgain(design: DesignSpec): DesignPrediction {
  const held = lately.get(design);
  if (held) return held;
  const prediction = familyById(design.family).predict(design.params);
  if (lately.size >= MOST_HELD) lately.delete(lately.keys().next().value!);
  lately.set(design, prediction);
  return prediction;
}

/** The entry with its words, from its name: predicted anew, since holding the words of all of them would cost more. */
function entryAgain(design: DesignSpec, checks: Entry['checks'], keptClasses: number | undefined): Entry {
  const prediction = predictAgain(design);
  if (keptClasses !== undefined) return keptClassEntry(design, prediction, checks, keptClasses);
  return entryOf(design, prediction, prediction.codes.find((code) => code.checks === checks)!);
}
