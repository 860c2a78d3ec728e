import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { LoadNote, PageHead } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { CardAccount } from './card-account';
import { ReadingForm } from './reading-form';
import { type ShopSettings, SettingsApi } from './settings-api';
import { ShopForm } from './shop-form';
import { TermsForm } from './terms-form';

/** What holds for the whole shop, in parts that are saved one by one. */
@Component({
  selector: 'tw-settings-page',
  imports: [CardAccount, LoadNote, PageHead, ReadingForm, ShopForm, TermsForm],
  providers: [OpenForms],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Settings" [sub]="settings.hasValue() ? settings.value().name : ''" />
    @if (settings.hasValue()) {
      @let shown = settings.value();
      <tw-shop-form [settings]="shown" (saved)="saved($event)" (stale)="settings.reload()" />
      <tw-terms-form [settings]="shown" (saved)="saved($event)" (stale)="settings.reload()" />
      <tw-card-account />
      <tw-reading-form [settings]="shown" (saved)="saved($event)" (stale)="settings.reload()" />
    } @else {
      <tw-load-note [of]="settings" />
    }
  `,
})
export class SettingsPage implements HasChanges {
  readonly #api = inject(SettingsApi);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #session = inject(Session);

  protected readonly settings = rxResource({ stream: () => this.#api.show() });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  protected saved({ settings, text }: { settings: ShopSettings; text: string }): void {
    this.settings.set(settings);
    this.#session.restateShop(settings);
    this.#messages.say(text);
  }
}
