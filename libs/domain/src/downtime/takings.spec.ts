import { missedTakings, takingsADay } from './takings';

describe('takings', () => {
  it('are the price of a cycle times the cycles of a usual day', () => {
    expect(takingsADay(425, 6)).toBe(2550);
    expect(takingsADay(425, 5.5)).toBe(2338);
    expect(takingsADay(425, 0)).toBe(0);
  });

  it('are missed by the time that passes', () => {
    const since = new Date('2031-05-06T10:00:00Z');
    expect(missedTakings(2550, since, new Date('2031-05-07T10:00:00Z'))).toBe(2550);
    expect(missedTakings(2550, since, new Date('2031-05-07T22:00:00Z'))).toBe(3825);
    expect(missedTakings(2550, since, new Date('2031-05-06T10:00:01Z'))).toBe(0);
  });

  it('are not missed before the machine stood still, as with a clock that is late', () => {
    const since = new Date('2031-05-06T10:00:00Z');
    expect(missedTakings(2550, since, new Date('2031-05-06T09:00:00Z'))).toBe(0);
  });
});
