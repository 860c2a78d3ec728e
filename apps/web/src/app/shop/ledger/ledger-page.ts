import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { PageHead, problemText, SectionHead, TextField } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { saveFile } from '../../core/api/save-file';
import { Messages } from '../../core/messages/messages';
import { EntryList } from './entry-list';
import { type AccountCode, LedgerApi } from './ledger-api';
import { TrialBalanceTable } from './trial-balance';

/** The shop's books: every account's balance, every entry, and all of it for another program. */
@Component({
  selector: 'tw-ledger-page',
  imports: [
    EntryList,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    SectionHead,
    TextField,
    TrialBalanceTable,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Ledger"
      sub="Double entry: every document’s entries are zero together."
    />
    <div class="on"><tw-text-field label="Balances on" type="date" [control]="on" /></div>
    <tw-trial-balance [on]="day()" (asked)="show($event)" />
    <tw-entry-list />
    <tw-section-head
      heading="Journal"
      sub="A plain-text journal that programs for bookkeeping read."
    />
    <form class="journal" [formGroup]="span" (ngSubmit)="download()">
      <tw-text-field label="From" type="date" [control]="span.controls.from" />
      <tw-text-field label="To" type="date" [control]="span.controls.to" />
      <button matButton="outlined" type="submit" [disabled]="busy()" disabledInteractive>
        Download the journal
      </button>
    </form>
  `,
  styles: `
    .on {
      max-inline-size: 12rem;
      margin-block-end: 1rem;
    }
    .journal {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0.75rem;
    }
    .journal tw-text-field {
      flex: 0 1 12rem;
    }
  `,
})
export class LedgerPage {
  readonly #api = inject(LedgerApi);
  readonly #host = inject<ElementRef<HTMLElement>>(ElementRef);
  readonly #messages = inject(Messages);

  protected readonly on = inject(NonNullableFormBuilder).control('');
  protected readonly day = toSignal(this.on.valueChanges, { initialValue: '' });
  protected readonly span = inject(NonNullableFormBuilder).group({ from: [''], to: [''] });
  protected readonly busy = signal(false);
  protected readonly entries = viewChild.required(EntryList);

  protected show(account: AccountCode): void {
    this.entries().narrowTo(account);
    const list = this.#host.nativeElement.querySelector('tw-entry-list');
    list?.scrollIntoView({ block: 'start' });
    list?.querySelector('select')?.focus({ preventScroll: true });
  }

  protected async download(): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    const { from, to } = this.span.getRawValue();
    const query = { ...(from ? { from } : {}), ...(to ? { to } : {}) };
    try {
      const file = await firstValueFrom(this.#api.journal(query));
      saveFile(file);
      this.#messages.say(`${file.name} holds the books.`);
    } catch (problem) {
      this.#messages.say(problemText(problem));
    } finally {
      this.busy.set(false);
    }
  }
}
