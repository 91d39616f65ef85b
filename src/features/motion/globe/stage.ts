/** Two stacked canvases kept in step with what they show: at most one picture per animation frame. */
import { readPalette, type Palette } from './palette';
import type { Picture } from './picture';
import { Studio } from './studio';

/** What a stage is told; size, scale and colours it finds itself. */
export type Shown = Omit<Picture, 'palette' | 'width' | 'height' | 'scale'>;

/** Device pixels to a CSS pixel while something moves. */
const MOVING_SCALE = 1.5;

export class Stage {
  readonly studio = new Studio();
  private readonly contexts: readonly [CanvasRenderingContext2D, CanvasRenderingContext2D] | null;
  private palette: Palette;
  private shown: Shown | null = null;
  private basePainted: Picture | null = null;
  private request = 0;
  private size = { width: 0, height: 0 };
  private readonly watchers: (() => void)[] = [];

  constructor(
    private readonly box: HTMLElement,
    private readonly base: HTMLCanvasElement,
    private readonly marks: HTMLCanvasElement,
  ) {
    const [a, b] = [base.getContext('2d'), marks.getContext('2d')];
    this.contexts = a && b ? [a, b] : null;
    this.palette = readPalette(box);
    const resize = new ResizeObserver(() => this.measure());
    resize.observe(box);
    const theme = new MutationObserver(() => this.recolour());
    theme.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
    const fonts = () => this.ask();
    document.fonts.addEventListener('loadingdone', fonts);
    this.watchers.push(
      () => resize.disconnect(),
      () => theme.disconnect(),
      () => document.fonts.removeEventListener('loadingdone', fonts),
    );
    this.measure();
  }

  show(shown: Shown): void {
    this.shown = shown;
    this.ask();
  }

  /** The picture as it would be drawn now, in CSS pixels: for hit tests. */
  picture(scale = 1): Picture | null {
    const { width, height } = this.size;
    return this.shown && width > 0 ? { ...this.shown, palette: this.palette, width, height, scale } : null;
  }

  dispose(): void {
    cancelAnimationFrame(this.request);
    for (const stop of this.watchers) stop();
  }

  private ask(): void {
    if (this.request === 0) this.request = requestAnimationFrame(() => this.paint());
  }

  private measure(): void {
    const { clientWidth: width, clientHeight: height } = this.box;
    if (width === this.size.width && height === this.size.height) return;
    this.size = { width, height };
    this.basePainted = null;
    if (this.shown) this.paint();
  }

  private recolour(): void {
    this.palette = readPalette(this.box);
    this.basePainted = null;
    this.ask();
  }

  private paint(): void {
    cancelAnimationFrame(this.request);
    this.request = 0;
    const device = window.devicePixelRatio || 1;
    const moving = this.shown?.moving ?? false;
    const picture = this.picture(moving ? Math.min(device, MOVING_SCALE) : device);
    if (!picture || !this.contexts) return;
    const [base, marks] = this.contexts;
    fitCanvas(this.base, picture);
    fitCanvas(this.marks, picture);
    if (!this.basePainted || !sameBase(this.basePainted, picture)) this.studio.paintBase(base, picture);
    this.basePainted = picture;
    this.studio.paintMarks(marks, picture);
  }
}

function fitCanvas(canvas: HTMLCanvasElement, { width, height, scale }: Picture): void {
  const [w, h] = [Math.round(width * scale), Math.round(height * scale)];
  if (canvas.width !== w || canvas.height !== h) {
    canvas.width = w;
    canvas.height = h;
  }
}

const BASE = [
  'scene',
  'frame',
  'flat',
  'off',
  'selected',
  'palette',
  'zoom',
  'width',
  'height',
  'scale',
  'moving',
] as const;

const sameBase = (a: Picture, b: Picture): boolean =>
  BASE.every((key) => a[key] === b[key]) &&
  a.centre.lat === b.centre.lat &&
  a.centre.lon === b.centre.lon &&
  a.centre.roll === b.centre.roll;
