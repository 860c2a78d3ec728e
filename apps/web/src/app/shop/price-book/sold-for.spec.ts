import { sampleBook } from './sample-book';
import { soldFor } from './sold-for';

describe('soldFor', () => {
  it('marks a cost up by its band, in whole steps', () => {
    expect(soldFor(2500, sampleBook)).toBe(4000);
    expect(soldFor(1001, sampleBook)).toBe(2005);
  });

  it('knows nothing while a band is missing', () => {
    const markup = { ...sampleBook.markup, bands: [{ fromUnitCost: 2500, basisPoints: 6000 }] };
    expect(soldFor(100, { ...sampleBook, markup })).toBeUndefined();
  });
});
