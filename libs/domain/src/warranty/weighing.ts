import { formatMoney } from '../money/amount';
import { type Bearer } from '../words/trade';
import { type LineToRule, type RulingContext } from './case';
import { type Reason, type ReasonCode, type Ruling } from './ruling';

/**
 * A ruling in the making. Rules are asked one after the other; the first that decides proposes the
 * bearer, and later ones may only note what else the owner will want to see.
 */
export class Weighing {
  readonly #reasons: Reason[] = [];
  #bearer: Bearer | undefined;
  #ask = false;

  constructor(
    readonly line: LineToRule,
    readonly context: RulingContext,
  ) {}

  get decided(): boolean {
    return this.#bearer !== undefined;
  }

  /** Undefined until a rule has decided. */
  get bearer(): Bearer | undefined {
    return this.#bearer;
  }

  noted(code: ReasonCode): boolean {
    return this.#reasons.some((reason) => reason.code === code);
  }

  note(code: ReasonCode, params: Reason['params'], words: string): void {
    this.#reasons.push({ code, params, words, decides: false });
  }

  decide(bearer: Bearer, code: ReasonCode, params: Reason['params'], words: string): void {
    if (this.#bearer !== undefined) throw new Error(`Already decided before ${code}`);
    this.#bearer = bearer;
    this.#reasons.push({ code, params, words, decides: true });
  }

  /** The line is for the owner to look at, whatever is proposed. */
  askOwner(): void {
    this.#ask = true;
  }

  ruling(): Ruling {
    const bearer = this.#bearer ?? 'store';
    const { list } = this.line;
    const { confirmAbove } = this.context.rules;
    if (bearer !== 'store' && list > confirmAbove) {
      const { currency, locale = 'en' } = this.context;
      const limit = formatMoney(confirmAbove, currency, locale);
      this.note(
        'above_confirm_limit',
        { list, confirmAbove },
        `Worth ${formatMoney(list, currency, locale)}; above ${limit} the owner confirms.`,
      );
      this.askOwner();
    }
    return { bearer, reasons: [...this.#reasons], needsConfirmation: this.#ask };
  }
}
