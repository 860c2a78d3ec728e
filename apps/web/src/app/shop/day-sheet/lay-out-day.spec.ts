import { type VisitItem } from '../visits/visits-api';
import { lineOf, rowOf, troubleOf } from './lay-out-day';

const zone = 'America/Chicago';
let made = 0;
function visit(from?: string, until?: string, change: Partial<VisitItem> = {}): VisitItem {
  const number = ++made;
  // Chicago is five hours behind in May.
  const at = (clock: string) => new Date(`2031-05-06T${clock}:00-05:00`).toISOString();
  return {
    id: `visit ${number}`,
    number,
    store: { id: 's', name: `Store ${number}`, address: '' },
    window: from && until ? { from: at(from), until: at(until) } : null,
    state: 'planned',
    arrivedAt: null,
    ...change,
  } as VisitItem;
}

describe('laying out a day', () => {
  beforeEach(() => (made = 0));

  it('shows the usual hours, and more where a visit needs them', () => {
    expect(lineOf([], zone)).toEqual({ from: 8, until: 17 });
    const visits = [visit('06:30', '07:30'), visit('17:00', '18:15')];
    expect(lineOf(visits, zone)).toEqual({ from: 6, until: 19 });
    expect(lineOf([visit('23:00', '00:30')], zone)).toEqual({ from: 8, until: 24 });
  });

  it('places a visit by its window', () => {
    const { placed } = rowOf([visit('10:15', '12:30')], { from: 8, until: 17 }, zone);
    expect(placed[0]).toMatchObject({ start: 25, width: 25, lane: 0 });
  });

  it('puts what overlaps into lanes of its own, and uses a lane again', () => {
    const visits = [
      visit('09:00', '11:00'),
      visit('10:00', '12:00'),
      visit('11:00', '12:00'),
      visit(),
    ];
    const row = rowOf(visits, { from: 8, until: 17 }, zone);
    expect(row.placed.map(({ lane }) => lane)).toEqual([0, 1, 0]);
    expect(row.lanes).toBe(2);
    expect(row.anyTime.map(({ number }) => number)).toEqual([4]);
  });
});

describe('what does not go well on a day', () => {
  const morning = new Date('2031-05-06T14:00:00Z');
  const evening = new Date('2031-05-06T23:00:00Z');

  it('is two visits of a tech at one time', () => {
    const [a, b, c] = [visit('09:00', '11:00'), visit('10:30', '12:00'), visit('12:00', '13:00')];
    expect(troubleOf(a, [a, b, c], morning)).toBe(`overlaps ${b.store.name}`);
    expect(troubleOf(c, [a, b, c], morning)).toBe('');
  });

  it('is a window that is over before anybody came', () => {
    const late = visit('09:00', '11:00');
    expect(troubleOf(late, [late], evening)).toBe('nobody is there yet');
    const there = visit('09:00', '11:00', {
      arrivedAt: '2031-05-06T14:30:00Z',
      state: 'in_process',
    });
    expect(troubleOf(there, [there], evening)).toBe('');
    const done = visit('09:00', '11:00', { state: 'completed' });
    expect(troubleOf(done, [done], evening)).toBe('');
  });
});
