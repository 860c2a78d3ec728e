import { TestBed } from '@angular/core/testing';
import { Reading } from './reading';
import { ClockPipe, DayPipe, InstantPipe, MonthPipe } from './time-pipes';
import { clockText, dayIn, dayText, instantText, minutesText, monthText, timeText } from './times';

describe('times as people read them', () => {
  it('shows a trade day as that day, whatever the zone of the device', () => {
    expect(dayText('2031-05-06', 'en-GB')).toBe('Tue, 6 May 2031');
    expect(monthText('2031-05', 'en-GB')).toBe('May 2031');
  });

  it("shows an instant on the shop's clock", () => {
    expect(instantText('2031-05-06T23:30:00Z', 'en-GB', 'Asia/Tokyo')).toBe('7 May 2031, 08:30');
    expect(clockText('2031-05-06T23:30:00Z', 'en-GB', 'Europe/London')).toBe('00:30');
    expect(dayIn('America/New_York', new Date('2031-05-07T03:00:00Z'))).toBe('2031-05-06');
  });

  it("writes the hour as the shop's language does", () => {
    const plain = (text: string) => text.replaceAll(/\s/g, ' ');
    expect(plain(clockText('2031-05-06T09:30:00Z', 'en-US', 'UTC'))).toBe('9:30 AM');
    expect(plain(timeText('09:00', 'en-US'))).toBe('9:00 AM');
    expect(timeText('09:00', 'en-GB')).toBe('09:00');
  });

  it.each([
    [0, '0 min'],
    [59, '59 min'],
    [60, '1 h'],
    [95, '1 h 35 min'],
  ])('says %s minutes as %s', (minutes, text) => {
    expect(minutesText(minutes)).toBe(text);
  });

  it('says the same in templates, and nothing for what is absent', () => {
    const reading = TestBed.inject(Reading);
    reading.locale.set('en-GB');
    reading.zone.set('Europe/London');
    TestBed.runInInjectionContext(() => {
      expect(new DayPipe().transform('2031-05-06')).toBe('Tue, 6 May 2031');
      expect(new DayPipe().transform(null)).toBe('');
      expect(new MonthPipe().transform('2031-05')).toBe('May 2031');
      expect(new InstantPipe().transform('2031-05-06T09:30:00Z')).toBe('6 May 2031, 10:30');
      expect(new ClockPipe().transform('2031-05-06T09:30:00Z')).toBe('10:30');
    });
  });
});
