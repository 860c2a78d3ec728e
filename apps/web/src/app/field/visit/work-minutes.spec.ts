import { sampleSheet } from '../projection/sample-sheet';
import { type Sheet, type SheetJob } from '../kept/kept';
import { workMinutes } from './work-minutes';

const now = new Date('2031-05-06T16:00:00Z');
const sheet = (arrivedAt: string | null, ...doneAt: (string | null)[]): Sheet => ({
  ...sampleSheet,
  visit: { ...sampleSheet.visit, arrivedAt },
  jobs: doneAt.map((at) => ({ doneAt: at }) as SheetJob),
});

describe('how long a machine has probably taken', () => {
  it.each([
    ['since arriving', sheet('2031-05-06T15:42:00Z'), 20],
    ['since the last machine was done', sheet('2031-05-06T15:00:00Z', '2031-05-06T15:53:00Z'), 10],
    ['with a job still open', sheet('2031-05-06T15:45:00Z', null), 15],
    ['at least five minutes', sheet('2031-05-06T15:59:30Z'), 5],
    ['five minutes when the clock was put back', sheet('2031-05-06T16:30:00Z'), 5],
    ['at most an hour: the tech was elsewhere', sheet('2031-05-06T08:00:00Z'), 60],
    ['ten minutes when nobody said when they came', sheet(null), 10],
  ])('%s', (_, of, minutes) => {
    expect(workMinutes(of, now)).toBe(minutes);
  });
});
