import { TestBed } from '@angular/core/testing';
import { MoneyText } from './money-text';
import { Reading } from './reading';

async function shown(inputs: Record<string, unknown>): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(MoneyText);
  for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('MoneyText', () => {
  it('takes currency and language from how the person reads', async () => {
    TestBed.inject(Reading).currency.set('GBP');
    TestBed.inject(Reading).locale.set('en-GB');
    expect((await shown({ amount: 38140 })).textContent).toBe('£381.40');
  });

  it('leaves the currency out where the column says it', async () => {
    expect((await shown({ amount: 9600, bare: true, currency: 'USD' })).textContent).toBe('96.00');
  });

  it('strikes a list value that was not charged', async () => {
    expect((await shown({ amount: 1, struck: true })).classList).toContain('tw-money--struck');
  });
});
