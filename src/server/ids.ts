import { randomBytes } from 'node:crypto';

const alphabet = '0123456789abcdefghjkmnpqrstvwxyz';
const randomBits = 80n;
let last = 0n;

/** A new id of 26 characters: milliseconds, then 80 random bits, so that ids sort in the order of making and lists can
 *  be paged by id. Ids made in one millisecond count up. */
export function newId(nowMs: number = Date.now()): string {
  const fresh = (BigInt(nowMs) << randomBits) | BigInt(`0x${randomBytes(10).toString('hex')}`);
  last = fresh >> randomBits > last >> randomBits ? fresh : last + 1n;
  let text = '';
  for (let shift = 125n; shift >= 0n; shift -= 5n) text += alphabet[Number((last >> shift) & 31n)];
  return text;
}

/** Whether a text could be one of our ids; anything else is simply not found. */
export const isId = (text: string): boolean => /^[0-9a-z]{26}$/.test(text);
