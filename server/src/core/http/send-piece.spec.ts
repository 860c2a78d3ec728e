import { PassThrough } from 'node:stream';
import { type Response } from 'express';
import { sendPiece } from './send-piece';

/** A reader that holds a few letters at once, as a slow connection does. */
const slowReader = () => new PassThrough({ highWaterMark: 8 });
const asResponse = (stream: PassThrough) => stream as unknown as Response;

describe('a long answer', () => {
  it('waits for a slow reader, and leaves nothing behind that listens', async () => {
    const reader = slowReader();
    let read = '';
    const taking = setInterval(() => (read += String(reader.read() ?? '')), 1);
    const listeners = reader.listenerCount('close');
    for (let piece = 0; piece < 20; piece++) {
      expect(await sendPiece(asResponse(reader), 'twelve words')).toBe(true);
    }
    clearInterval(taking);
    expect(read.length).toBeGreaterThanOrEqual(19 * 12);
    expect(reader.listenerCount('close')).toBe(listeners);
    expect(reader.listenerCount('drain')).toBe(0);
  });

  it('ends when the reader leaves', async () => {
    const reader = slowReader();
    setTimeout(() => reader.destroy(), 5);
    expect(await sendPiece(asResponse(reader), 'more than eight')).toBe(false);
    expect(await sendPiece(asResponse(reader), 'and more')).toBe(false);
  });
});
