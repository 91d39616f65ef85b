import busboy from 'busboy';
import { Readable } from 'node:stream';
import type { ReadableStream as NodeStream } from 'node:stream/web';
import { isPlain, plain } from '~/plain';
import { Problem } from './problem';

export interface Upload {
  readonly fields: Readonly<Record<string, string>>;
  /** The part called `file`; null where there is none. */
  readonly file: { readonly name: string; readonly bytes: Uint8Array } | null;
}

const FIELD_BYTES = 1_000_000;

/**
 * Reads one multipart body, counting while it streams.
 * @throws Problem `UnsupportedMediaType`, `BodyTooLarge` or `InvalidRequest`
 */
export async function readUpload(request: Request, limitBytes: number): Promise<Upload> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^multipart\/form-data\b/i.test(type)) {
    throw new Problem('UnsupportedMediaType', { detail: 'Send multipart/form-data with the part `file`.' });
  }
  if (Number(request.headers.get('content-length') ?? 0) > limitBytes + FIELD_BYTES)
    throw tooLarge(limitBytes);
  if (!request.body) throw new Problem('InvalidRequest', { detail: 'The body is empty.' });
  return collect(Readable.fromWeb(request.body as NodeStream), type, limitBytes);
}

function collect(body: Readable, type: string, limitBytes: number): Promise<Upload> {
  return new Promise((resolve, reject) => {
    const fields: Record<string, string> = {};
    let file: Upload['file'] = null;
    const fail = (problem: Problem): void => {
      body.unpipe(parser);
      body.resume();
      reject(problem);
    };
    const broken = (): void =>
      fail(new Problem('InvalidRequest', { detail: 'The multipart body is broken or ends too early.' }));
    const parser = parserFor(type, limitBytes);
    parser.on('field', (name, value, info) => {
      if (info.valueTruncated) fail(tooLarge(FIELD_BYTES));
      else if (isPlain(value)) fields[name] = value;
      else
        fail(new Problem('InvalidRequest', { detail: `The field ${plain(name)} holds control characters.` }));
    });
    parser.on('file', (name, stream, info) => {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('error', broken);
      stream.on('limit', () => fail(tooLarge(limitBytes)));
      stream.on('end', () => {
        if (name === 'file')
          file = { name: plain(info.filename || 'file'), bytes: new Uint8Array(Buffer.concat(chunks)) };
      });
    });
    parser.on('close', () => resolve({ fields, file }));
    parser.on('error', broken);
    body.on('error', () => reject(new Problem('ClientGone')));
    body.pipe(parser);
  });
}

/** @throws Problem `InvalidRequest` for a type without its boundary */
function parserFor(type: string, limitBytes: number): busboy.Busboy {
  try {
    return busboy({
      headers: { 'content-type': type },
      defParamCharset: 'utf8',
      limits: { files: 1, fields: 20, fileSize: limitBytes, fieldSize: FIELD_BYTES },
    });
  } catch {
    throw new Problem('InvalidRequest', { detail: 'The multipart type names no boundary.' });
  }
}

const tooLarge = (limitBytes: number): Problem =>
  new Problem('BodyTooLarge', {
    detail: `The most that is read here is ${Math.round(limitBytes / 1024 / 1024)} MB.`,
  });
