/**
 * Bytes to text. UTF-8 is read as it is; a byte-order mark is noted; UTF-16 is recognised by its mark; bytes that
 * are not UTF-8 are read as Windows-1252, which spreadsheets still write, and said so.
 */
export interface Decoded {
  readonly text: string;
  readonly notes: readonly string[];
}

export function decode(bytes: Uint8Array): Decoded {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return utf16(bytes.subarray(2), 'utf-16le');
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return utf16(bytes.subarray(2), 'utf-16be');
  const marked = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf;
  const body = marked ? bytes.subarray(3) : bytes;
  const notes = marked
    ? ['The file starts with a byte-order mark, which is not part of its first heading.']
    : [];
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(body), notes };
  } catch {
    return {
      text: new TextDecoder('windows-1252').decode(body),
      notes: [...notes, 'The file is not UTF-8 and was read as Windows-1252: check accented names.'],
    };
  }
}

function utf16(body: Uint8Array, encoding: 'utf-16le' | 'utf-16be'): Decoded {
  return { text: new TextDecoder(encoding).decode(body), notes: ['The file is UTF-16.'] };
}
