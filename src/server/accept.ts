/** Which of two media types a request would rather have (RFC 9110 §12.5.1). */

/** Weight of a media type by the most specific range that names it; 0 where none does. */
function weight(header: string, type: string): number {
  const [group] = type.split('/');
  const ranges = header.split(',').map((part) => {
    const [range = '', ...parameters] = part.split(';').map((piece) => piece.trim().toLowerCase());
    const q = parameters.find((parameter) => parameter.startsWith('q='));
    return { range, q: q ? Number(q.slice(2)) || 0 : 1 };
  });
  for (const wanted of [type, `${group}/*`, '*/*']) {
    const found = ranges.find(({ range }) => range === wanted);
    if (found) return found.q;
  }
  return 0;
}

/** True where `other` is wanted more than what is usually sent. */
export function prefers(request: Request, usual: string, other: string): boolean {
  const header = request.headers.get('accept');
  return header !== null && weight(header, other) > weight(header, usual);
}
