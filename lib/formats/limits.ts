/** Characters a text may have: 100,000 three-line sets have some 17 million. */
export const MAX_TEXT_CHARS = 32_000_000;

/** Lines a text may have. */
export const MAX_LINES = 1_000_000;

/** Sets read from one text, good and bad together; what follows is not read, and that is said. */
export const MAX_SETS = 100_000;

/** Characters a line of a TLE, KVN or CSV text may have, or a text in quotes or a tag elsewhere. */
export const MAX_LINE_CHARS = 4_000;

/** Characters one OMM object or XML element may have; a full one needs some 1,500. */
export const MAX_ITEM_CHARS = 20_000;

/** Characters of refused text that are carried in a report. */
export const MAX_REJECTED_RAW = 4_000;

/** Characters of an object name; catalogues print up to 24. */
export const MAX_NAME_CHARS = 80;
