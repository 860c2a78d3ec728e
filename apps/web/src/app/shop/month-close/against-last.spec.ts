import { againstLast } from './against-last';

const month = { visits: 5, charged: 36_000, tax: 2_000, unusual: false };
const before = { visits: 5, charged: 36_000, tax: 2_000, closing: 38_000 };

describe('againstLast', () => {
  it('says that there is nothing to compare with', () => {
    expect(againstLast({ ...month, lastMonth: null }, 'April').words).toBe('first statement');
  });

  it('counts visits more or less', () => {
    const more = { ...month, visits: 7, lastMonth: before };
    expect(againstLast(more, 'April').words).toBe('+ 2 visits');
    expect(againstLast({ ...more, visits: 4 }, 'April').words).toBe('− 1 visit');
  });

  it('is as usual within a quarter, and says the share beyond', () => {
    expect(againstLast({ ...month, lastMonth: before }, 'April').words).toBe('as usual');
    const dearer = { ...month, charged: 74_000, lastMonth: before };
    expect(againstLast(dearer, 'April')).toEqual({ words: '100 % more', look: false });
    const cheaper = { ...month, charged: 17_000, lastMonth: before };
    expect(againstLast(cheaper, 'April').words).toBe('50 % less');
  });

  it('asks for a look at what the server finds unusual, even with more visits', () => {
    const store = { visits: 9, charged: 190_000, tax: 420, unusual: true };
    const last = { ...before, charged: 36_000, tax: 0 };
    expect(againstLast({ ...store, lastMonth: last }, 'April')).toEqual({
      words: '5 times April: look',
      look: true,
    });
  });

  it('does not divide by a month without charges', () => {
    const nothing = { ...before, charged: 0, tax: 0 };
    expect(againstLast({ ...month, lastMonth: nothing }, 'April').words).toBe(
      'nothing in the last',
    );
  });
});
