/** A path sink that flattens what it is given, and a non-zero point test over the result. */
import type { PathSink } from '../../../src/features/motion/globe/clip';

type XY = [number, number];

export class Recorder implements PathSink {
  readonly runs: XY[][] = [];
  beginPath(): void {
    this.runs.length = 0;
  }
  moveTo(x: number, y: number): void {
    this.runs.push([[x, y]]);
  }
  lineTo(x: number, y: number): void {
    this.runs[this.runs.length - 1]?.push([x, y]);
  }
  closePath(): void {
    const run = this.runs[this.runs.length - 1];
    if (run?.[0]) run.push([...run[0]] as XY);
  }
  /** As the HTML canvas: angles clockwise from +x with y down, a whole turn at most. */
  arc(x: number, y: number, r: number, from: number, to: number, anticlockwise = false): void {
    const turn = 2 * Math.PI;
    let sweep = anticlockwise ? from - to : to - from;
    sweep = Math.abs(sweep) >= turn ? turn : ((sweep % turn) + turn) % turn;
    const steps = Math.max(1, Math.ceil(sweep / 0.002));
    for (let i = 0; i <= steps; i++) {
      const a = from + ((anticlockwise ? -1 : 1) * sweep * i) / steps;
      const point: XY = [x + r * Math.cos(a), y + r * Math.sin(a)];
      const run = this.runs[this.runs.length - 1];
      if (run) run.push(point);
      else this.runs.push([point]);
    }
  }
  /** Non-zero winding, open runs closed as a canvas does when filling. */
  inside(px: number, py: number): boolean {
    let winding = 0;
    for (const run of this.runs) {
      for (let i = 0, j = run.length - 1; i < run.length; j = i++) {
        const [x1, y1] = run[j] as XY;
        const [x2, y2] = run[i] as XY;
        if (y1 <= py !== y2 <= py) {
          const x = x1 + ((py - y1) / (y2 - y1)) * (x2 - x1);
          if (x > px) winding += y2 > y1 ? 1 : -1;
        }
      }
    }
    return winding !== 0;
  }
}
