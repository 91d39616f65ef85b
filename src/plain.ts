/** No control characters but tab and line breaks, no lone surrogates (XML 1.0 §2.2; PostgreSQL's text takes no NUL). */
// eslint-disable-next-line no-control-regex
const UNPLAIN = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f\ufffe\uffff]|\p{Surrogate}/u;

export const isPlain = (text: string): boolean => !UNPLAIN.test(text);
/** The text with a low line for each character that is not plain. */
export const plain = (text: string): string => text.replace(new RegExp(UNPLAIN, 'gu'), '_');
