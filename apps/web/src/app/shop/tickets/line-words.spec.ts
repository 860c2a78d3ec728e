import { jobWords, quantityWords, ticketWords } from './line-words';
import { type TicketJob, type TicketLine } from './tickets-api';

const line = (unit: TicketLine['unit'], quantityMilli: number) =>
  ({ unit, quantityMilli }) as TicketLine;
const job = (change: Partial<TicketJob>) =>
  ({
    finding: '',
    action: '',
    cause: null,
    result: 'put_right',
    machine: {},
    ...change,
  }) as TicketJob;

describe('a ticket in words', () => {
  it('says how much', () => {
    expect(quantityWords(line('minute', 95_000))).toBe('1 h 35 min');
    expect(quantityWords(line('each', 2_500))).toBe('2.5');
    expect(quantityWords(line('each', 1_000))).toBe('');
  });

  it('says what was found and done', () => {
    expect(jobWords(job({ finding: 'Valve blocked', action: 'Valve fitted' }))).toBe(
      'Valve blocked. Valve fitted',
    );
    expect(jobWords(job({ result: 'nothing_found', action: 'ignored' }))).toBe('Nothing found');
    expect(jobWords(job({ cause: 'shop_error' }))).toBe('our own mistake');
  });

  it('counts machines over one trip', () => {
    expect(ticketWords([job({})])).toBe('1 machine, one trip');
    expect(ticketWords([job({}), job({})])).toBe('2 machines, one trip');
  });
});
