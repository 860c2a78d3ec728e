import { type BaseHarnessFilters, ComponentHarness, HarnessPredicate } from '@angular/cdk/testing';

interface TicketFilters extends BaseHarnessFilters {
  stub?: string | RegExp;
  planned?: boolean;
}

export class TicketHarness extends ComponentHarness {
  static readonly hostSelector = 'tw-ticket';

  static with(filters: TicketFilters): HarnessPredicate<TicketHarness> {
    return new HarnessPredicate(TicketHarness, filters)
      .addOption('stub', filters.stub, (ticket, text) =>
        HarnessPredicate.stringMatches(ticket.stubText(), text),
      )
      .addOption(
        'planned',
        filters.planned,
        async (ticket, planned) =>
          (await (await ticket.host()).hasClass('tw-ticket--planned')) === planned,
      );
  }

  async stubText(): Promise<string> {
    return (await this.locatorFor('.stub')()).text();
  }

  async bodyText(): Promise<string> {
    return (await this.locatorFor('.body')()).text();
  }

  async copy(): Promise<string | null> {
    return (await this.host()).getAttribute('data-copy');
  }
}
