import { type Answer, escapeHtml, html } from '../http';
import { page } from '../page';
import { type Thing } from './books';
import { sessionLines } from './resources/checkout';

const note = 'Test card page of the local fake of Stripe. No money moves, no real card is taken.';

export function money(amount: unknown, currency: unknown): string {
  const code = String(currency ?? 'usd').toUpperCase();
  const format = new Intl.NumberFormat('en', { style: 'currency', currency: code });
  const digits = format.resolvedOptions().maximumFractionDigits ?? 2;
  return format.format(Number(amount) / 10 ** digits);
}

const fields = `
<label for="number">Card number</label>
<input id="number" name="number" inputmode="numeric" autocomplete="cc-number" required
  aria-describedby="number-help">
<p id="number-help">4242 4242 4242 4242 succeeds; 4000 0000 0000 0002 is declined;
4000 0000 0000 9995 lacks the funds.</p>
<div class="pair">
<div><label for="expiry">Expires (month / year)</label>
<input id="expiry" name="expiry" inputmode="numeric" autocomplete="cc-exp" placeholder="12 / 34"
  required></div>
<div><label for="cvc">Security code</label>
<input id="cvc" name="cvc" inputmode="numeric" autocomplete="cc-csc" required></div>
</div>
<label for="name">Name on the card</label>
<input id="name" name="name" autocomplete="cc-name" required>`;

function problemLine(problem: string | undefined): string {
  return problem ? `<p class="problem" role="alert">${escapeHtml(problem)}</p>` : '';
}

function way(session: Thing): { title: string; button: string } {
  if (session.mode === 'setup') return { title: 'Keep a card', button: 'Keep this card' };
  const amount = money(session.amount_total, session.currency);
  if (session.mode === 'subscription') return { title: 'Subscribe', button: 'Subscribe' };
  return { title: 'Pay by card', button: `Pay ${amount}` };
}

export function cardPage(session: Thing, problem?: string): Answer {
  const { title, button } = way(session);
  const lines = sessionLines(session)
    .map(
      (line) =>
        `<li>${escapeHtml(line.description)}: ${money(line.amount_total, line.currency)}</li>`,
    )
    .join('\n');
  const total =
    session.amount_total === null
      ? ''
      : `<p class="amount">${money(session.amount_total, session.currency)}</p>`;
  const email = session.customer_email ? escapeHtml(String(session.customer_email)) : '';
  const back = session.cancel_url
    ? `<p><a href="${escapeHtml(String(session.cancel_url))}">Go back without paying</a></p>`
    : '';
  const body = `<h1>${title}</h1>
${total}
${lines ? `<ul>${lines}</ul>` : ''}
${problemLine(problem)}
<form method="post" novalidate>
<label for="email">Email for the receipt</label>
<input id="email" name="email" type="email" autocomplete="email" value="${email}">
${fields}
<button type="submit">${escapeHtml(button)}</button>
</form>
${back}`;
  return html(page(title, note, body, true), problem ? 402 : 200);
}

export function endedPage(session: Thing): Answer {
  const back = session.cancel_url ?? session.success_url;
  const body = `<h1>This payment page has expired</h1>
<p>Nothing was charged. <a href="${escapeHtml(String(back))}">Go back</a> and begin again.</p>`;
  return html(page('Expired', note, body, true), 410);
}

export function onboardingPage(account: Thing): Answer {
  const body = `<h1>Let ${escapeHtml(String(account.email ?? account.id))} take card payments</h1>
<p>The real service asks for papers and a bank account here. The fake asks for nothing.</p>
<form method="post"><button type="submit">Finish</button></form>`;
  return html(page('Set up card payments', note, body, true));
}

export function absentPage(): Answer {
  return html(page('Not here', note, '<h1>There is nothing at this address</h1>', true), 404);
}

export function overviewPage(payments: { account: string; intent: Thing }[]): Answer {
  const rows = payments
    .map(
      ({ account, intent }) => `<tr><td>${escapeHtml(account || 'platform')}</td>
<td>${escapeHtml(intent.id)}</td><td>${money(intent.amount, intent.currency)}</td>
<td>${escapeHtml(String(intent.status))}</td></tr>`,
    )
    .join('\n');
  const body = `<h1>Local fake of Stripe</h1>
${
  rows
    ? `<table><thead><tr><th scope="col">Account</th><th scope="col">Payment</th>
<th scope="col">Amount</th><th scope="col">State</th></tr></thead><tbody>${rows}</tbody></table>`
    : '<p>No payment yet.</p>'
}
<p><a href="/fake/requests">Requests received</a></p>`;
  return html(page('Local fake of Stripe', note, body));
}
