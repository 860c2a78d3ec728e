import { choice, dayCell, decimal, money, yesNo } from './cells';

describe('a cell', () => {
  it.each([
    ['3.50', 'USD', 350],
    ['3,5', 'USD', 350],
    ['12', 'USD', 1200],
    ['12', 'JPY', 12],
    ['1,250', 'KWD', 1250],
  ])('reads %s %s as %d minor units', (cell, currency, amount) => {
    expect(money(currency).read(cell)).toBe(amount);
  });

  it.each([
    ['1,250.00', 'USD'],
    ['1,250', 'USD'],
    ['3.505', 'USD'],
    ['0.5', 'JPY'],
    ['-1', 'USD'],
    ['$3', 'USD'],
    ['9999999999999', 'USD'],
  ])('refuses %s as an amount in %s', (cell, currency) => {
    expect(() => money(currency).read(cell)).toThrow(/is not an amount written like/);
  });

  it('takes days that exist, written one way', () => {
    expect(dayCell.read('2032-02-29')).toBe('2032-02-29');
    for (const wrong of ['2031-02-29', '4/30/2031', '30.04.2031', '2031-4-3']) {
      expect(() => dayCell.read(wrong)).toThrow(/is not a day/);
    }
  });

  it('takes a stored word as people write it', () => {
    const kind = choice(['top_loader', 'dryer']);
    for (const cell of ['Top loader', 'top_loader', 'TOP-LOADER', 'Top  Loader']) {
      expect(kind.read(cell)).toBe('top_loader');
    }
    expect(kind.show('top_loader')).toBe('Top loader');
    expect(() => kind.read('toaster')).toThrow('is none of Top loader, Dryer');
    expect([yesNo.read('YES'), yesNo.read('0')]).toEqual([true, false]);
    expect(() => yesNo.read('perhaps')).toThrow();
  });

  it('takes numbers with as many decimals as are kept', () => {
    expect(decimal(2, 1000).read('12,25')).toBe(12.25);
    expect(() => decimal(0, 1000).read('1.5')).toThrow();
    expect(() => decimal(1, 1000).read('1000.5')).toThrow();
    expect(() => decimal(1, 1000).read('1e2')).toThrow();
  });
});
