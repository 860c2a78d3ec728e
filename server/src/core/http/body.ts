import { type Operation } from '@lib/contracts';
import express, { type Request, type RequestHandler } from 'express';
import multer from 'multer';
import { problem } from '../problems/problem';

const upload = multer({
  storage: multer.memoryStorage(),
  // Browsers send file names in UTF-8.
  defParamCharset: 'utf8',
  limits: { fileSize: 12 * 1024 * 1024, files: 1, fields: 8, parts: 10, fieldSize: 4096 },
});
const json = express.json({ limit: '512kb', strict: true, type: 'application/json' });

/** Reads the body the operation takes, and refuses any other kind. */
export function readBody(operation: Operation): RequestHandler[] {
  const type = operation.bodyType ?? (operation.body ? 'application/json' : undefined);
  if (!type) return [];
  const mayBeMissing = type === 'application/json';
  const ofType: RequestHandler = (request, _response, next) => {
    const fits = request.is(type) || (mayBeMissing && isEmpty(request));
    next(fits ? undefined : problem('unsupported-content', `Send ${type}.`));
  };
  return type === 'multipart/form-data' ? [ofType, readFile()] : [ofType, json];
}

/** Nothing sent is read as an object without fields: the contract says whether that will do. */
function isEmpty(request: Request): boolean {
  const { 'transfer-encoding': pieces, 'content-length': length } = request.headers;
  return pieces === undefined && (length === undefined || Number(length) === 0);
}

function readFile(): RequestHandler {
  const single = upload.single('file');
  return (request, response, next) =>
    single(request, response, (error: unknown) => {
      if (!error) return next();
      const tooLarge = (error as { code?: string }).code === 'LIMIT_FILE_SIZE';
      next(problem(tooLarge ? 'too-large' : 'malformed-request'));
    });
}
