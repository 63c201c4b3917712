/** Sets of bits as a file, one a line, counted from 0. */
export const setList = (fileName: string, sets: readonly Uint32Array[], heads: readonly string[] = []) => ({
  fileName,
  text: `${[...(heads.length > 0 ? ['class'] : []), 'size', 'bits'].join(',')}\n${sets
    .map((set, i) => `${heads.length > 0 ? `${heads[i]},` : ''}${set.length},${[...set].join(' ')}\n`)
    .join('')}`,
});
