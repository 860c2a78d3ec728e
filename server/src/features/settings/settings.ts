import { isCurrencyCode } from '@lib/domain';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { changes } from '../../core/database/changes';
import { row, rows, withTenant, write } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid } from '../../core/problems/problem';
import { orStale } from '../../core/versions';
import { addEdition } from '../prices/add-edition';
import { firstBook } from '../prices/first-book';

type Settings = AnswerOf<'shop.show'>;
type Change = InputOf<'shop.change'>['body'];

interface SettingsRow extends Omit<Settings, 'setUpAt'> {
  setUpAt: Date | null;
}

export function showSettings(context: Context): Promise<Settings> {
  return withTenant(context, async () => {
    const settings = found(
      await row<SettingsRow>(
        `select h.id, h.name, h.currency, h.zone, h.locale, h.card_account is not null as "takesCards",
           exists (select 1 from tickets t where t.shop_id = h.id) as "currencyFixed",
           s.address, s.tax_number as "taxNumber", s.phone, s.mail_name as "mailName",
           s.reply_to as "replyTo", s.statement_day as "statementDay",
           s.statement_hour as "statementHour", s.close_by_schedule as "closeBySchedule",
           s.terms_days as "termsDays", s.late_charge_basis_points as "lateChargeBasisPoints",
           s.late_charge_day_count as "lateChargeDayCount", s.set_up_at as "setUpAt", s.version
         from shops h join shop_settings s on s.shop_id = h.id where h.id = $shopId`,
        { shopId: context.shopId },
      ),
    );
    return { ...settings, setUpAt: instantOrNull(settings.setUpAt) };
  });
}

/** The version is that of the settings row, which every change touches, whichever table it is in. */
export function changeSettings(context: Context, version: number, body: Change): Promise<Settings> {
  return withTenant(context, async () => {
    const { name, zone, currency, locale, ...rest } = body;
    const before = await showSettings(context);
    const { set, bind } = changes(rest, {
      address: 'address',
      taxNumber: 'tax_number',
      phone: 'phone',
      mailName: 'mail_name',
      replyTo: 'reply_to',
      statementDay: 'statement_day',
      statementHour: 'statement_hour',
      closeBySchedule: 'close_by_schedule',
      termsDays: 'terms_days',
      lateChargeBasisPoints: 'late_charge_basis_points',
      lateChargeDayCount: 'late_charge_day_count',
    });
    const shopId = context.shopId;
    await orStale(
      await write(
        `update shop_settings set ${set} where shop_id = $shopId and version = $version
         returning version`,
        { ...bind, shopId, version },
      ),
      () => row('select 1 from shop_settings where shop_id = $shopId', { shopId }),
    );
    if (currency !== undefined && currency !== before.currency) {
      await changeCurrency(context, before, currency);
    }
    const ofShop = changes(
      { name, zone, locale },
      { name: 'name', zone: 'zone', locale: 'locale' },
    );
    await write(`update shops set ${ofShop.set} where id = $shopId`, { ...ofShop.bind, shopId });
    await record(
      context,
      'settings changed',
      { kind: 'shop', id: shopId },
      {
        fields: Object.keys(body),
      },
    );
    await announce(context, 'shop', shopId);
    return showSettings(context);
  });
}

/**
 * Amounts in the price book are of the old currency, so each of its days gets an edition to start
 * with in the new one.
 */
async function changeCurrency(context: Context, before: Settings, currency: string): Promise<void> {
  const known = isCurrencyCode(currency) && Intl.supportedValuesOf('currency').includes(currency);
  if (!known) throw invalid([{ pointer: '/currency', detail: 'is not a currency in use' }]);
  if (before.currencyFixed) {
    throw invalid([
      { pointer: '/currency', detail: `stays ${before.currency}: tickets stand in it` },
    ]);
  }
  await write('update shops set currency = $currency where id = $shopId', {
    shopId: context.shopId,
    currency,
  });
  const days = await rows<{ valid_from: string }>(
    'select distinct valid_from from editions where shop_id = $shopId order by valid_from',
    { shopId: context.shopId },
  );
  for (const day of days) {
    const note = `To start with in ${currency}`;
    await addEdition(context, { validFrom: day.valid_from, note, book: firstBook(currency) });
  }
}

export function finishSetUp(context: Context): Promise<Settings> {
  return withTenant(context, async () => {
    await write(
      `update shop_settings set set_up_at = $now where shop_id = $shopId and set_up_at is null`,
      { shopId: context.shopId, now: context.now },
    );
    return showSettings(context);
  });
}
