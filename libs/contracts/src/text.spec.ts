import { line, words } from './text';

const complaints = (read: ReturnType<typeof line>, value: string) =>
  read.safeParse(value).error?.issues.map((issue) => issue.message) ?? [];

describe('what a person typed', () => {
  it('is trimmed', () => {
    expect(line(20).parse('  Foxglove Lane ')).toBe('Foxglove Lane');
  });

  it.each(['two\nlines', 'a\ttab'])(
    'is told what is wrong with %j where one line is meant',
    (value) => {
      expect(complaints(line(20), value)).toEqual([
        'holds a line break or a tab: one line is meant',
      ]);
      expect(words(20).parse(value)).toBe(value);
    },
  );

  it.each(['NUL\u0000', 'bell\u0007', 'half \ud800', 'delete\u007f'])('is not %j', (value) => {
    expect(complaints(line(20), value)).toEqual(['holds characters that cannot be stored']);
    expect(words(20).safeParse(value).success).toBe(false);
  });
});
