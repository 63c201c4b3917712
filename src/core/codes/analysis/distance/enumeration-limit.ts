/** Largest dimension, of a code or of its dual, whose words are all visited for a weight distribution. */
export const ENUMERATION_LIMIT = 26;
