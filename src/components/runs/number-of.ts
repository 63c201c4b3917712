/** A number as people type it: spaces between groups and 1e6 are fine; anything else is no number. */
export const numberOf = (text: string): number => {
  const plain = text.replaceAll(/[\s\u2009\u202f]/g, '');
  return plain === '' ? Number.NaN : Number(plain);
};
