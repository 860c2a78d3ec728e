import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { TicketHarness } from '../testing/ticket-harness';
import { TicketCard } from './ticket-card';

@Component({
  selector: 'tw-ticket-host',
  imports: [TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-ticket copy="canary" [planned]="true"
      ><b stub>0412</b>
      <p>3 machines, one trip</p></tw-ticket
    >
    <tw-ticket><b stub>A-03</b>Fills slowly</tw-ticket>
  `,
})
class TicketHost {}

describe('TicketCard', () => {
  it('keeps what belongs on the stub apart from the body', async () => {
    const fixture = TestBed.createComponent(TicketHost);
    const loader = TestbedHarnessEnvironment.loader(fixture);
    const [first, second] = await loader.getAllHarnesses(TicketHarness);
    expect(await first?.stubText()).toBe('0412');
    expect(await first?.bodyText()).toBe('3 machines, one trip');
    expect(await first?.copy()).toBe('canary');
    expect(await second?.bodyText()).toBe('Fills slowly');
    expect(await second?.copy()).toBeNull();
  });

  it('shows that a visit is only planned', async () => {
    const fixture = TestBed.createComponent(TicketHost);
    const loader = TestbedHarnessEnvironment.loader(fixture);
    const planned = await loader.getAllHarnesses(TicketHarness.with({ planned: true }));
    expect(planned).toHaveLength(1);
  });
});
