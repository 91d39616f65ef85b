/** What a picture or a PDF holds, beyond its first bytes. */
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { PNG } from 'pngjs';

export interface Picture {
  readonly width: number;
  readonly height: number;
  /** Different colours within a rectangle given in shares of the picture. */
  readonly colours: (area: Area) => number;
}

interface Area {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export function readPng(bytes: Uint8Array): Picture {
  const { width, height, data } = PNG.sync.read(Buffer.from(bytes));
  const colours = ({ left, right, top, bottom }: Area): number => {
    const seen = new Set<number>();
    for (let y = Math.floor(top * height); y < bottom * height; y++)
      for (let x = Math.floor(left * width); x < right * width; x++)
        seen.add(data.readUInt32BE(4 * (y * width + x)));
    return seen.size;
  };
  return { width, height, colours };
}

/** Size in points and text of a PDF's only page, no-break and thin spaces as spaces. */
export async function readPdf(bytes: Uint8Array): Promise<{ width: number; height: number; text: string }> {
  const document = await getDocument({ data: new Uint8Array(bytes), useSystemFonts: false, verbosity: 0 })
    .promise;
  if (document.numPages !== 1) throw new Error(`${document.numPages} pages, where one was meant`);
  const page = await document.getPage(1);
  const content = await page.getTextContent();
  const text = content.items.map((item) => ('str' in item ? item.str : '')).join(' ');
  const [, , width = 0, height = 0] = page.view;
  return { width, height, text: text.replace(/[\u00a0\u2009]/g, ' ').replace(/ +/g, ' ') };
}
