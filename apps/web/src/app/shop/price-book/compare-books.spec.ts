import { bookLines, type BookTexts } from './book-lines';
import { compareBooks } from './compare-books';
import { sampleBook } from './sample-book';

const texts: BookTexts = {
  money: (amount) => `$${(amount / 100).toFixed(2)}`,
  distance: (metres) => `${metres} m`,
  day: (day) => day,
  part: () => 'Door lock DL-2',
};

function valueOf(key: string): string | undefined {
  return bookLines(sampleBook, texts).find((line) => line.key === key)?.value;
}

describe('a price book in lines', () => {
  it('says each rule in words', () => {
    expect(valueOf('hour')).toBe('$95.00');
    expect(valueOf('access')).toBe('billed beyond an allowance of 10 min');
    expect(valueOf('trip area Town')).toBe('$40.00');
    expect(valueOf('band 2500')).toBe('60 %');
    expect(valueOf('part p1')).toBe('$19.99');
    expect(valueOf('tax MN part 2031-01-01')).toBe('6.875 %');
    expect(valueOf('excluded')).toBe('misuse, vandalism');
  });

  it('gives every line a key of its own', () => {
    const keys = bookLines(sampleBook, texts).map(({ key }) => key);
    expect(new Set(keys).size).toBe(keys.length);
  });
});

describe('comparing with the edition before', () => {
  const before = bookLines(sampleBook, texts);

  it('finds nothing in the same book, and nothing without one before', () => {
    for (const other of [before, undefined]) {
      expect(compareBooks(before, other).every(({ changes }) => changes === 0)).toBe(true);
    }
  });

  it('finds what changed, what is new and what is gone', () => {
    const now = bookLines(
      {
        ...sampleBook,
        labour: { ...sampleBook.labour, normalPerHour: 9900 },
        trips: [{ label: 'Trip', amount: 6500 }],
        warranty: { ...sampleBook.warranty, partDaysByCategory: { door: 180, pump: 365 } },
      },
      texts,
    );
    const found = compareBooks(now, before).flatMap(({ lines }) =>
      lines.filter((line) => line.before !== undefined),
    );
    expect(found.map(({ key, before, value, gone }) => [key, before, value, gone])).toEqual([
      ['hour', '$95.00', '$99.00', false],
      ['trip area Town', '$40.00', '', true],
      ['category pump', null, '365 days', false],
    ]);
  });
});
