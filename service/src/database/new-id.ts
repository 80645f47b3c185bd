import { customAlphabet } from 'nanoid';

/** Sixteen characters of a 32-letter alphabet without i, l, o, u: 80 random bits, easy to read out. */
export const newId: () => string = customAlphabet('0123456789abcdefghjkmnpqrstvwxyz', 16);
