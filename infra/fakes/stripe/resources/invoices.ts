import { type Thing } from '../books';
import { type Call, change, find, newId, paged, retrieve, type Route, text } from '../call';
import { invalid } from '../errors';
import { usableMethod } from './customers';
import { cardError, openIntent, tryCard } from './payments';

export interface Line {
  amount: number;
  description: string;
  price: string;
  quantity: number;
  period: { start: number; end: number };
}

/** A finalized invoice of a subscription's period; unpaid as yet. */
export function openInvoice(
  call: Call,
  subscription: Thing,
  lines: readonly Line[],
  reason: string,
): Thing {
  const total = lines.reduce((sum, line) => sum + line.amount, 0);
  const id = newId('in');
  const count = call.books.all(call.account, 'invoice').length + 1;
  const invoice = call.books.put(call.account, {
    id,
    object: 'invoice',
    created: call.now,
    livemode: false,
    number: `FAKE-${String(count).padStart(5, '0')}`,
    status: 'open',
    billing_reason: reason,
    collection_method: subscription.collection_method,
    currency: subscription.currency,
    customer: subscription.customer,
    amount_due: total,
    amount_paid: 0,
    amount_remaining: total,
    subtotal: total,
    total,
    attempt_count: 0,
    attempted: false,
    hosted_invoice_url: `${call.url}/invoice/${id}`,
    invoice_pdf: null,
    lines: {
      object: 'list',
      has_more: false,
      url: `/v1/invoices/${id}/lines`,
      data: lines.map((line) => ({
        id: newId('il'),
        object: 'line_item',
        amount: line.amount,
        currency: subscription.currency,
        description: line.description,
        period: line.period,
        pricing: { type: 'price_details', price_details: { price: line.price } },
        quantity: line.quantity,
      })),
    },
    metadata: {},
    parent: {
      type: 'subscription_details',
      quote_details: null,
      subscription_details: { subscription: subscription.id, metadata: subscription.metadata },
    },
    period_start: lines[0]?.period.start ?? call.now,
    period_end: lines[0]?.period.end ?? call.now,
    payments: { object: 'list', data: [], has_more: false, url: '/v1/invoice_payments' },
    status_transitions: { finalized_at: call.now, paid_at: null, voided_at: null },
    _subscription: subscription.id,
  });
  call.emit('invoice.created', invoice);
  call.emit('invoice.finalized', invoice);
  return total === 0 ? markPaid(call, invoice, undefined) : invoice;
}

function markPaid(call: Call, invoice: Thing, intent: Thing | undefined): Thing {
  const paid = change(call, invoice, {
    status: 'paid',
    amount_paid: invoice.total,
    amount_remaining: 0,
    attempted: true,
    attempt_count: Number(invoice.attempt_count) + (intent ? 1 : 0),
    status_transitions: { ...(invoice.status_transitions as object), paid_at: call.now },
    payments: intent ? paymentsOf(invoice, intent, 'paid') : invoice.payments,
  });
  call.emit('invoice.paid', paid);
  call.emit('invoice.payment_succeeded', paid);
  return paid;
}

function paymentsOf(invoice: Thing, intent: Thing, status: string): Record<string, unknown> {
  const data = [
    {
      id: newId('inpay'),
      object: 'invoice_payment',
      invoice: invoice.id,
      is_default: true,
      status,
      payment: { type: 'payment_intent', payment_intent: intent.id },
    },
  ];
  return { object: 'list', data, has_more: false, url: '/v1/invoice_payments' };
}

/** Charges an open invoice; the invoice as it then stands, and the intent that tells why. */
export function collect(
  call: Call,
  invoice: Thing,
  method: Thing,
): { invoice: Thing; intent: Thing } {
  const intent = tryCard(
    call,
    openIntent(call, {
      amount: Number(invoice.amount_remaining),
      currency: String(invoice.currency),
      customer: invoice.customer as string,
      description: `Invoice ${invoice.number}`,
    }),
    method,
  );
  if (!intent.last_payment_error) return { invoice: markPaid(call, invoice, intent), intent };
  const failed = change(call, invoice, {
    attempted: true,
    attempt_count: Number(invoice.attempt_count) + 1,
    payments: paymentsOf(invoice, intent, 'open'),
  });
  call.emit('invoice.payment_failed', failed);
  return { invoice: failed, intent };
}

/** What a customer pays with when nothing else is said. */
export function defaultMethod(call: Call, customerId: string, own?: unknown): Thing | undefined {
  const customer = find(call, 'customer', customerId);
  const settings = customer.invoice_settings as { default_payment_method: string | null };
  const id = (own as string | null | undefined) ?? settings.default_payment_method;
  return id ? find(call, 'payment_method', id) : undefined;
}

/** `afterwards` lets the subscription follow what became of its invoice. */
export function invoiceRoutes(afterwards: (call: Call, invoice: Thing) => void): Route[] {
  function pay(call: Call): Thing {
    const invoice = find(call, 'invoice', call.ids[0]);
    if (invoice.status !== 'open') {
      throw invalid(`Invoice is already ${invoice.status}`, 'invoice_already_paid');
    }
    const asked = text(call, 'payment_method');
    const method = asked
      ? usableMethod(call, asked)
      : defaultMethod(call, String(invoice.customer));
    if (!method) {
      throw invalid('There is no `default_payment_method` set on this Customer or Invoice.');
    }
    const result = collect(call, invoice, method);
    afterwards(call, result.invoice);
    if (result.intent.last_payment_error) throw cardError(result.intent);
    return result.invoice;
  }

  function voided(call: Call): Thing {
    const invoice = find(call, 'invoice', call.ids[0]);
    if (invoice.status !== 'open') throw invalid('Only open invoices can be voided.');
    const done = change(call, invoice, { status: 'void', amount_remaining: 0 });
    call.emit('invoice.voided', done);
    return done;
  }

  function list(call: Call): Record<string, unknown> {
    const subscription = text(call, 'subscription');
    const invoices = call.books
      .all(call.account, 'invoice')
      .filter((invoice) => !subscription || invoice._subscription === subscription);
    return paged(call, invoices, ['customer', 'status']);
  }

  return [
    ['GET', '/v1/invoices', list],
    ['GET', '/v1/invoices/:', retrieve('invoice')],
    ['POST', '/v1/invoices/:/pay', pay],
    ['POST', '/v1/invoices/:/void', voided],
  ];
}
