import { type KeptPart } from '../kept/kept';
import { findParts } from './find-parts';

const part = (number: string, name: string, category: string): KeptPart => ({
  id: number,
  number,
  name,
  category,
  scarce: false,
  successor: null,
});
const book = [
  part('PW-20', 'Door lock', 'door'),
  part('DL-7', 'Türschloss, kurz', 'door'),
  part('20-DOOR', 'Hinge screw M6', 'screws'),
];
const numbers = (words: string) => findParts(book, words, 10).map(({ number }) => number);

describe('finding a part without a signal', () => {
  it('wants every word, wherever it stands', () => {
    expect(numbers('lock door')).toEqual(['PW-20']);
    expect(numbers('screw m6')).toEqual(['20-DOOR']);
    expect(numbers('lock hinge')).toEqual([]);
  });

  it('reads past accents and capitals', () => {
    expect(numbers('TURSCH')).toEqual(['DL-7']);
  });

  it('puts numbers that begin so first', () => {
    expect(numbers('20')).toEqual(['20-DOOR', 'PW-20']);
  });

  it('finds nothing for nothing, and at most what is asked for', () => {
    expect(numbers('  ')).toEqual([]);
    expect(findParts(book, 'door', 2)).toHaveLength(2);
  });
});
