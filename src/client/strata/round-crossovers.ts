/** 5, 2 and 1 of each decade within the limits, descending. */
export function roundCrossovers(bottom: number, top: number): number[] {
  const found: number[] = [];
  for (let e = Math.ceil(Math.log10(top)); e >= Math.floor(Math.log10(bottom)); e--)
    for (const digit of [5, 2, 1]) {
      const p = Number(`${digit}e${e}`);
      if (p >= bottom && p <= top) found.push(p);
    }
  return found;
}

export const isRound = (p: number): boolean => /^[125]e/.test(p.toExponential());
