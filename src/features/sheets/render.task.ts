/** Worker task: turns a page's SVG into PNG or PDF bytes. Fonts come from files; text stays text in the PDF. */
import { setImmediate } from 'node:timers/promises';
import { setFlagsFromString } from 'node:v8';
import { runInNewContext } from 'node:vm';
import { Resvg } from '@resvg/resvg-js';
import PDFDocument from 'pdfkit';
import SVGtoPDF from 'svg-to-pdfkit';
import { FONT_FILES, fontKey } from './slice/fonts';
import type { Family } from './slice/svg';

export interface RenderJob {
  readonly svg: string;
  readonly width_pt: number;
  readonly height_pt: number;
  readonly format: 'png' | 'pdf';
  readonly dpi: number;
  readonly title: string;
}

const fontFiles = (): string[] => Object.values(FONT_FILES).map((file) => file());
/** The converters take the fonts from files; an embedded WOFF2 would only slow them. */
const withoutStyle = (svg: string): string => svg.replace(/<style>[\s\S]*?<\/style>/, '');
/** svg-to-pdfkit takes bare lengths as points and lengths in pt as 4/3 of them. */
const inPoints = (svg: string): string => svg.replace(/(width|height)="([\d.]+)pt"/g, '$1="$2"');

export default async function render(job: RenderJob): Promise<Uint8Array> {
  if (job.format === 'pdf') return pdf(job);
  const bytes = png(job);
  await freePictures();
  return bytes;
}

function png({ svg, width_pt, dpi }: RenderJob): Uint8Array {
  const width = Math.round((width_pt / 72) * dpi);
  const resvg = new Resvg(withoutStyle(svg), {
    fitTo: { mode: 'width', value: width },
    font: { fontFiles: fontFiles(), loadSystemFonts: false, defaultFontFamily: 'Inter' },
  });
  const image = resvg.render();
  const bytes = new Uint8Array(image.asPng());
  pixelsKept += image.width * image.height;
  return bytes;
}

/** Pictures lie outside the heap that the collector watches: left alone, it never sees the need to free them. */
const MOST_PIXELS_KEPT = 16e6;
let pixelsKept = 0;
let collect: (() => void) | null = null;

/** Waits for the collector before the thread sleeps: asleep, it would run no finalizer. */
async function freePictures(): Promise<void> {
  if (pixelsKept < MOST_PIXELS_KEPT) return;
  pixelsKept = 0;
  if (!collect) {
    setFlagsFromString('--expose-gc');
    collect = runInNewContext('gc') as () => void;
  }
  await setImmediate();
  collect();
  await setImmediate();
}

function pdf({ svg, width_pt, height_pt, title }: RenderJob): Promise<Uint8Array> {
  const document = new PDFDocument({
    size: [width_pt, height_pt],
    margin: 0,
    info: { Title: title, Creator: 'Driftwright' },
    lang: 'en',
  });
  for (const [key, file] of Object.entries(FONT_FILES)) document.registerFont(key, file());
  const chunks: Buffer[] = [];
  document.on('data', (chunk: Buffer) => chunks.push(chunk));
  const ended = new Promise<Uint8Array>((resolve, reject) => {
    document.on('end', () => resolve(new Uint8Array(Buffer.concat(chunks))));
    document.on('error', reject);
  });
  SVGtoPDF(document, inPoints(withoutStyle(svg)), 0, 0, {
    assumePt: true,
    width: width_pt,
    height: height_pt,
    fontCallback: (family: string, bold: boolean, italic: boolean, options: { fontWeight?: string }) => {
      const name = (family.includes('Serif') ? 'Source Serif 4' : 'Inter') satisfies Family;
      return fontKey(name, Number(options.fontWeight ?? (bold ? 600 : 400)) || (bold ? 600 : 400), italic);
    },
  } as Parameters<typeof SVGtoPDF>[4]);
  document.end();
  return ended;
}
