/**
 * Orthographic drawing of shapes on the visible half of the sphere. A shape is turned into view coordinates by one
 * matrix; what lies behind the horizon is cut, and cut rings are closed by true arcs along the limb.
 *
 * Rings have their inside to the left, so along the limb (anticlockwise, the visible half to the left) the piece
 * that leaves at one point goes on to the next point of entry. The rule holds for any number of crossings, for
 * rings over poles, and for several rings of one block at a time.
 */
import { contains } from './contains';
import { turnBack } from './matrix';
import type { Points, Shape } from './shape';

/** What a path is drawn on: a canvas context, a Path2D, or a test's recorder. */
export interface PathSink {
  moveTo(x: number, y: number): void;
  lineTo(x: number, y: number): void;
  arc(x: number, y: number, radius: number, from: number, to: number, anticlockwise?: boolean): void;
  closePath(): void;
}

/** The globe's disc on the canvas, pixels. */
export interface Disc {
  readonly cx: number;
  readonly cy: number;
  readonly radius: number;
}

export type Visibility = 'hidden' | 'whole' | 'cut';

/** A run of visible vertices between two crossings of the limb; offsets into the clipper's view array. */
interface Piece {
  start: number;
  end: number;
  entry: number;
  exit: number;
  done: boolean;
}

const TURN = 2 * Math.PI;

export class Clipper {
  /** View coordinates of the loaded rings' vertices, interleaved. */
  private view = new Float64Array(3 * 4096);
  /** x, y of the pieces' points. */
  private line = new Float64Array(2 * 4096);
  private used = 0;
  private pieces: Piece[] = [];
  /** Ends of whole rings in `view` (offset pairs). */
  private wholes: [start: number, end: number][] = [];
  private limbInside = false;

  /** Turns a shape by `m` (row-major, at an offset) and finds how much of it is seen. */
  load(shape: Shape, level: number, m: ArrayLike<number>, at = 0): Visibility {
    const [cx, cy, cz] = shape.cap;
    const z = (m[at + 6] as number) * cx + (m[at + 7] as number) * cy + (m[at + 8] as number) * cz;
    const angle = Math.acos(Math.max(-1, Math.min(1, z)));
    if (angle - shape.radius > Math.PI / 2) return 'hidden';
    const parts = shape.levels[level] ?? shape.levels[0] ?? [];
    const inFront = angle + shape.radius < Math.PI / 2;
    this.reset(parts);
    let offset = 0;
    for (const part of parts) offset = this.turnPart(part, m, at, offset);
    offset = 0;
    let cut = false;
    for (const part of parts) {
      const end = offset + part.length;
      if (inFront) this.wholes.push([offset, end]);
      else cut = (shape.closed ? this.cutRing(offset, end) : this.cutLine(offset, end)) || cut;
      offset = end;
    }
    if (!inFront && shape.closed && this.pieces.length === 0 && shape.radius >= Math.PI / 2) {
      this.limbInside = contains(shape, turnBack(m, [1, 0, 0], at));
    }
    if (cut || this.limbInside) return 'cut';
    return this.wholes.length > 0 ? 'whole' : 'hidden';
  }

  /** Adds the loaded shape's visible region to a path, to be filled by the non-zero rule. */
  fill(sink: PathSink, disc: Disc): void {
    for (const [start, end] of this.wholes) this.drawWhole(sink, disc, start, end, true);
    if (this.limbInside) {
      sink.moveTo(disc.cx + disc.radius, disc.cy);
      sink.arc(disc.cx, disc.cy, disc.radius, 0, -TURN, true);
      sink.closePath();
    }
    for (const first of this.pieces) {
      if (first.done) continue;
      let piece = first;
      let begun = false;
      do {
        piece.done = true;
        this.drawPiece(sink, disc, piece, !begun);
        begun = true;
        const next = this.nextEntry(piece.exit, first);
        sink.arc(disc.cx, disc.cy, disc.radius, -piece.exit, -next.entry, true);
        piece = next;
      } while (piece !== first);
      sink.closePath();
    }
    for (const piece of this.pieces) piece.done = false;
  }

  /** Adds the visible parts of the loaded shape's edges, never the limb, to a path to be stroked. */
  stroke(sink: PathSink, disc: Disc, closed = true): void {
    for (const [start, end] of this.wholes) this.drawWhole(sink, disc, start, end, closed);
    for (const piece of this.pieces) this.drawPiece(sink, disc, piece, true);
  }

  private reset(parts: readonly Points[]): void {
    let length = 0;
    for (const part of parts) length += part.length;
    if (this.view.length < length) this.view = new Float64Array(2 * length);
    if (this.line.length < 2 * length) this.line = new Float64Array(4 * length);
    this.used = 0;
    this.pieces = [];
    this.wholes = [];
    this.limbInside = false;
  }

  private turnPart(part: Points, m: ArrayLike<number>, at: number, offset: number): number {
    const view = this.view;
    const m0 = m[at] as number, m1 = m[at + 1] as number, m2 = m[at + 2] as number; // prettier-ignore
    const m3 = m[at + 3] as number, m4 = m[at + 4] as number, m5 = m[at + 5] as number; // prettier-ignore
    const m6 = m[at + 6] as number, m7 = m[at + 7] as number, m8 = m[at + 8] as number; // prettier-ignore
    for (let i = 0; i < part.length; i += 3) {
      const x = part[i] as number;
      const y = part[i + 1] as number;
      const z = part[i + 2] as number;
      view[offset++] = m0 * x + m1 * y + m2 * z;
      view[offset++] = m3 * x + m4 * y + m5 * z;
      view[offset++] = m6 * x + m7 * y + m8 * z;
    }
    return offset;
  }

  /** Splits a ring at the limb; true where it crosses. A vertex on the limb itself counts as behind it. */
  private cutRing(start: number, end: number): boolean {
    const view = this.view;
    let entry = -1;
    let seen = false;
    let before = (view[end - 1] as number) > 0;
    for (let i = start; i < end; i += 3) {
      const now = (view[i + 2] as number) > 0;
      if (now) seen = true;
      if (now && !before) entry = i;
      before = now;
    }
    if (!seen) return false;
    if (entry < 0) {
      this.wholes.push([start, end]);
      return false;
    }
    const n = (end - start) / 3;
    const first = (entry - start) / 3;
    let piece: Piece | null = null;
    for (let k = 0; k <= n; k++) {
      const i = start + 3 * ((first + k) % n);
      const previous = start + 3 * ((first + k + n - 1) % n);
      piece = this.step(piece, previous, i, k === n);
    }
    return true;
  }

  private cutLine(start: number, end: number): boolean {
    let piece: Piece | null = null;
    const view = this.view;
    if ((view[start + 2] as number) > 0) piece = this.open(0);
    if (piece) this.push(view[start] as number, view[start + 1] as number);
    for (let i = start + 3; i < end; i += 3) piece = this.step(piece, i - 3, i, false);
    if (piece) piece.end = this.used;
    return true;
  }

  /** Follows one edge: opens a piece where it comes into view, closes one where it leaves. */
  private step(piece: Piece | null, from: number, to: number, closing: boolean): Piece | null {
    const view = this.view;
    const was = (view[from + 2] as number) > 0;
    const is = (view[to + 2] as number) > 0;
    if (is && !was && !closing) {
      const [x, y] = this.crossing(to, from);
      piece = this.open(Math.atan2(y, x));
      this.push(x, y);
    }
    if (is && piece) this.push(view[to] as number, view[to + 1] as number);
    if (was && !is && piece) {
      const [x, y] = this.crossing(from, to);
      this.push(x, y);
      piece.exit = Math.atan2(y, x);
      piece.end = this.used;
      return null;
    }
    return piece;
  }

  private open(entry: number): Piece {
    const piece = { start: this.used, end: this.used, entry, exit: 0, done: false };
    this.pieces.push(piece);
    return piece;
  }

  private push(x: number, y: number): void {
    if (this.used + 2 > this.line.length) {
      const grown = new Float64Array(2 * this.line.length);
      grown.set(this.line);
      this.line = grown;
    }
    this.line[this.used++] = x;
    this.line[this.used++] = y;
  }

  /** Point of the great circle through a seen and a hidden vertex on the limb, view coordinates. */
  private crossing(seen: number, hidden: number): [number, number] {
    const view = this.view;
    const zs = view[seen + 2] as number;
    const zh = -(view[hidden + 2] as number);
    const x = (view[seen] as number) * zh + (view[hidden] as number) * zs;
    const y = (view[seen + 1] as number) * zh + (view[hidden + 1] as number) * zs;
    const length = Math.hypot(x, y) || 1;
    return [x / length, y / length];
  }

  /** The entry that follows an exit anticlockwise along the limb. */
  private nextEntry(exit: number, first: Piece): Piece {
    let best = first;
    let least = Infinity;
    for (const piece of this.pieces) {
      if (piece.done && piece !== first) continue;
      let gap = (piece.entry - exit) % TURN;
      if (gap < 0) gap += TURN;
      // The same point, reached by a vertex that only touches the limb, must not become a whole turn.
      if (gap > TURN - 1e-9) gap = 0;
      if (gap < least) [best, least] = [piece, gap];
    }
    return best;
  }

  private drawWhole(sink: PathSink, disc: Disc, start: number, end: number, closed: boolean): void {
    const view = this.view;
    const { cx, cy, radius } = disc;
    sink.moveTo(cx + radius * (view[start] as number), cy - radius * (view[start + 1] as number));
    for (let i = start + 3; i < end; i += 3) {
      sink.lineTo(cx + radius * (view[i] as number), cy - radius * (view[i + 1] as number));
    }
    if (closed) sink.closePath();
  }

  private drawPiece(sink: PathSink, disc: Disc, piece: Piece, move: boolean): void {
    const line = this.line;
    const { cx, cy, radius } = disc;
    for (let i = piece.start; i < piece.end; i += 2) {
      const x = cx + radius * (line[i] as number);
      const y = cy - radius * (line[i + 1] as number);
      if (move && i === piece.start) sink.moveTo(x, y);
      else sink.lineTo(x, y);
    }
  }
}
