import { basisPointsFrom, distanceText, distanceUnit, metresFrom, percentText } from './measures';

describe('percent', () => {
  it.each([
    ['8.25', 825],
    ['8,25', 825],
    ['8.875', 887.5],
    ['40 %', 4000],
    ['0', 0],
    ['6.00125', 600.125],
  ])('reads %s', (text, points) => {
    expect(basisPointsFrom(text)).toBe(points);
  });

  it.each(['', '-1', '1.2.3', 'a', '99999', '1.234567'])('refuses %j', (text) => {
    expect(basisPointsFrom(text)).toBeUndefined();
  });

  it.each([
    [825, '8.25'],
    [887.5, '8.875'],
    [10000, '100'],
    [0, '0'],
  ])('writes %d', (points, text) => {
    expect(percentText(points)).toBe(text);
    expect(basisPointsFrom(text)).toBe(points);
  });
});

describe('distance', () => {
  it('is in miles where roads are', () => {
    expect(distanceUnit('en-US').sign).toBe('mi');
    expect(distanceUnit('de-AT').sign).toBe('km');
  });

  it('comes back as it was written', () => {
    for (const locale of ['en-US', 'fr-FR']) {
      const unit = distanceUnit(locale);
      for (const text of ['0', '1', '7.5', '25', '40.25', '999']) {
        expect(distanceText(metresFrom(text, unit) ?? NaN, unit)).toBe(text);
      }
    }
  });

  it('refuses what is no distance', () => {
    expect(metresFrom('far', distanceUnit('en-US'))).toBeUndefined();
    expect(metresFrom('-4', distanceUnit('en-US'))).toBeUndefined();
  });
});
