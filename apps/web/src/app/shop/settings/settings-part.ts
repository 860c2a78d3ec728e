import { Directive, effect, inject, input, output } from '@angular/core';
import { type FormGroup } from '@angular/forms';
import { type BodyOf } from '@lib/contracts/web';
import { OpenForms } from '../../core/forms/open-forms';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { Session } from '../../core/session/session';
import { type ShopSettings, SettingsApi } from './settings-api';

/** What the parts of the settings have in common: each is a form of its own over the same row. */
@Directive()
export abstract class SettingsPart {
  readonly #api = inject(SettingsApi);
  readonly #forms = inject(OpenForms);
  readonly #session = inject(Session);

  readonly settings = input.required<ShopSettings>();
  readonly saved = output<{ settings: ShopSettings; text: string }>();
  /** Somebody else changed the settings meanwhile: they should be loaded anew. */
  readonly stale = output<void>();

  protected mayChange(): boolean {
    return this.#session.mayChange('settings.change');
  }

  /** Call it as the form's own field, after the form. */
  protected saving(
    form: FormGroup,
    body: () => BodyOf<'shop.change'>,
    text: (settings: ShopSettings) => string,
  ): Submission<ShopSettings> {
    this.#forms.follow(form);
    effect(() => {
      const settings = this.settings();
      if (!form.dirty) form.reset(this.valuesOf(settings));
      if (this.mayChange()) form.enable({ emitEvent: false });
      else form.disable({ emitEvent: false });
    });
    const saving: Submission<ShopSettings> = submission(
      form,
      () => this.#api.change(this.settings().version, body()),
      {
        done: (settings) => this.saved.emit({ settings, text: text(settings) }),
        refused: (problem) => toldStale(problem, { reload: () => this.stale.emit() }, saving.notes),
      },
    );
    return saving;
  }

  /** The form's values for these settings. */
  protected abstract valuesOf(settings: ShopSettings): object;
}
