import type { Request, Response } from 'express';
import multer from 'multer';
import { Problem } from '#shared/problem.ts';
import { cleanName } from './clean-name.ts';

/** A file that somebody sent, as it came. */
export type Upload = {
  readonly bytes: Buffer;
  /** Cleaned, for people to read; never a path. */
  readonly name: string;
};

/** The part of a multipart message that holds the rest of the input as JSON. */
const bodyPart = 'body';
const mostBodyBytes = 256 * 1024;
/** Around a file: boundaries, names and the other part. */
const envelopeBytes = mostBodyBytes + 16 * 1024;

const sizeWords = (bytes: number) =>
  bytes >= 1_000_000 ? `${(bytes / 1_000_000).toLocaleString('en')} MB` : `${Math.round(bytes / 1000)} kB`;

const tooLarge = (limitBytes: number) =>
  new Problem('too-large', `A file may have at most ${sizeWords(limitBytes)}. Nothing was kept.`);

/**
 * Reads the file of a multipart message into memory, and the JSON beside it into the request's body.
 *
 * Called once it is known who sends it, so that a stranger's file is never read.
 *
 * @param limitBytes of this use; more is refused before it is read, where the sender says how much it is
 * @returns null when the message has no file
 * @throws Problem `too-large` or `invalid-input`
 */
export async function receiveUpload(request: Request, response: Response, limitBytes: number): Promise<Upload | null> {
  if (!request.is('multipart/form-data')) return null;
  if (Number(request.headers['content-length'] ?? 0) > limitBytes + envelopeBytes) throw tooLarge(limitBytes);
  const limits = { fileSize: limitBytes, files: 1, fields: 1, parts: 2, fieldSize: mostBodyBytes, fieldNameSize: 40 };
  const receive = multer({ storage: multer.memoryStorage(), limits, defParamCharset: 'utf8' }).single('file');
  await new Promise<void>((resolve, reject) => {
    receive(request, response, (error: unknown) => (error ? reject(refusal(error, limitBytes)) : resolve()));
  });
  request.body = bodyOf(request.body);
  const { file } = request;
  return file === undefined ? null : { bytes: file.buffer, name: cleanName(file.originalname) };
}

/** What the parser of messages throws is a fault in what was sent. */
function refusal(error: unknown, limitBytes: number): Problem {
  if (error instanceof multer.MulterError && error.code === 'LIMIT_FILE_SIZE') return tooLarge(limitBytes);
  return new Problem('invalid-input', 'This could not be read. Send one file at a time.', [
    { pointer: '/file', detail: 'Not readable; choose the file again' },
  ]);
}

function bodyOf(parts: Record<string, unknown> | undefined): unknown {
  const text = parts?.[bodyPart];
  if (typeof text !== 'string') return {};
  try {
    return JSON.parse(text);
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    throw new Problem('invalid-input', 'This could not be read. Send JSON.', [
      { pointer: '', detail: 'Not readable as JSON' },
    ]);
  }
}
