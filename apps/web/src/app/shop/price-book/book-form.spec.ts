import { bookForm, bookOf, tripForm } from './book-form';
import { sampleBook } from './sample-book';

describe('a price book as a form', () => {
  it('comes back as it went in', () => {
    expect(bookOf(bookForm(sampleBook))).toEqual(sampleBook);
  });

  it('leaves out of a trip rule what it does not name', () => {
    const form = bookForm(sampleBook);
    const trip = tripForm({ label: 'Far', amount: 9000, upToMetres: 40_000 });
    form.controls.trips.push(trip);
    expect(bookOf(form).trips.at(-1)).toEqual({ label: 'Far', amount: 9000, upToMetres: 40_000 });
  });

  it('refuses what is missing or out of bounds', () => {
    const form = bookForm(sampleBook);
    form.controls.labour.controls.normalPerHour.setValue(null);
    form.controls.labour.controls.incrementMinutes.setValue(0);
    form.controls.warranty.controls.callbackDays.setValue(366);
    expect(form.controls.labour.controls.normalPerHour.hasError('required')).toBe(true);
    expect(form.controls.labour.controls.incrementMinutes.hasError('min')).toBe(true);
    expect(form.controls.warranty.controls.callbackDays.hasError('max')).toBe(true);
  });
});
