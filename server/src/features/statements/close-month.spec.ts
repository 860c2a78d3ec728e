import { lastDueMonth } from './close-month';

describe('the month that is due to be closed', () => {
  const shop = { zone: 'America/New_York', statementDay: 3, statementHour: 6 };

  it('is last month from the statement day and hour on, by the clock of the shop', () => {
    expect(lastDueMonth(new Date('2031-06-03T09:59:00Z'), shop)).toBe('2031-04');
    expect(lastDueMonth(new Date('2031-06-03T10:00:00Z'), shop)).toBe('2031-05');
    expect(lastDueMonth(new Date('2031-06-30T23:00:00Z'), shop)).toBe('2031-05');
  });

  it('turns with the month of the shop, not of the server', () => {
    const auckland = { zone: 'Pacific/Auckland', statementDay: 1, statementHour: 0 };
    // There it is the first of June already.
    expect(lastDueMonth(new Date('2031-05-31T12:30:00Z'), auckland)).toBe('2031-05');
    expect(lastDueMonth(new Date('2031-05-31T12:30:00Z'), { ...shop, statementDay: 1 })).toBe(
      '2031-04',
    );
  });

  it('reaches back over the turn of the year', () => {
    expect(lastDueMonth(new Date('2031-01-02T12:00:00Z'), shop)).toBe('2030-11');
  });
});
