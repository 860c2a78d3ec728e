import { areaOf, homeOf, safeNext } from './areas';

describe('areas', () => {
  it('each role has its home', () => {
    expect(homeOf('office')).toBe('/shop');
    expect(homeOf('tech')).toBe('/field');
    expect(homeOf('attendant')).toBe('/client');
    expect(areaOf('platform_admin').copy).toBe('stub');
  });

  it.each([
    ['/shop/calls?state=open', '/shop/calls?state=open'],
    ['//elsewhere.example', undefined],
    ['/\\elsewhere.example', undefined],
    ['https://elsewhere.example', undefined],
    ['/sign-in?next=/shop', undefined],
    ['', undefined],
    [null, undefined],
  ])('goes on to %s only when it is a page of ours', (next, safe) => {
    expect(safeNext(next)).toBe(safe);
  });
});
