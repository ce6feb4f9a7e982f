/** The page where a person pays with a test card, or goes back without paying. */
import { type Answer, type Call, redirect } from './http';
import { type Html, markup, page, raw } from './page';
import { type Session } from './payment-records';
import { PaymentRefusal, type PaymentRules, minorDigits } from './payment-rules';

const MOST_FORM_BYTES = 10_000;

/** Answers GET and POST of /checkout/{session}. */
export async function checkoutPage(call: Call, rules: PaymentRules, changed: () => void): Promise<Answer> {
  const id = call.path.slice('/checkout/'.length);
  let session: Session;
  try {
    session = rules.getSession(id);
  } catch (error) {
    if (!(error instanceof PaymentRefusal)) throw error;
    return page(
      'No such payment',
      markup`<p>This address belongs to no payment. It may be from before the stand-in was restarted.</p>`,
      { status: 404 },
    );
  }
  if (session.status === 'complete')
    return call.method === 'POST' ? redirect(returnAddress(session)) : finished(session);
  if (session.status === 'expired') return expired(session);
  if (call.method !== 'POST') return form(session, null);

  const fields = new URLSearchParams((await call.body(MOST_FORM_BYTES)).toString('utf8'));
  const problem = fieldProblem(fields);
  if (problem) return form(session, problem);
  const outcome = rules.payWithCard(session.id, fields.get('number') ?? '');
  changed();
  return outcome.ok ? redirect(returnAddress(session)) : form(session, outcome.message);
}

/** Where the browser goes after paying. It proves nothing: only the signed event does. */
function returnAddress(session: Session): string {
  return session.successUrl.replaceAll('{CHECKOUT_SESSION_ID}', session.id);
}

export function money(amountMinor: number, currency: string): string {
  const digits = minorDigits(currency);
  return `${(amountMinor / 10 ** digits).toFixed(digits)} ${currency.toUpperCase()}`;
}

function form(session: Session, problem: string | null): Answer {
  const content = markup`${facts(session)}
${problem ? markup`<p class="error" role="alert" id="problem">${problem}</p>` : raw('')}
<form class="card" method="post" autocomplete="off" aria-label="Card">
<div><label for="number">Card number</label><input id="number" name="number" inputmode="numeric" autocomplete="off" required ${problem ? raw('aria-invalid="true" aria-describedby="problem cards"') : raw('aria-describedby="cards"')}></div>
<div class="pair">
<div><label for="expiry">Expiry (MM/YY)</label><input id="expiry" name="expiry" value="12/40" autocomplete="off" required></div>
<div><label for="cvc">Security code</label><input id="cvc" name="cvc" value="123" inputmode="numeric" autocomplete="off" required></div>
</div>
<button type="submit">Pay ${money(session.amountMinor, session.currency)}</button>
</form>
${session.cancelUrl ? markup`<p><a href="${session.cancelUrl}">Cancel and go back</a></p>` : raw('')}
<div id="cards">
<h2>Test cards</h2>
<p>Only these numbers are known here. Never type a real one.</p>
<dl>
<dt><code>4242 4242 4242 4242</code></dt><dd>is paid</dd>
<dt><code>4000 0000 0000 0002</code></dt><dd>is declined</dd>
<dt><code>4000 0000 0000 9995</code></dt><dd>is declined: not enough money</dd>
<dt><code>4000 0000 0000 0069</code></dt><dd>is declined: expired card</dd>
<dt><code>4000 0000 0000 0127</code></dt><dd>is declined: wrong security code</dd>
</dl>
</div>`;
  return page(`Pay ${money(session.amountMinor, session.currency)}`, content, {
    status: problem ? 402 : 200,
    formTargets: [new URL(returnAddress(session)).origin],
  });
}

function finished(session: Session): Answer {
  return page(
    'Paid',
    markup`${facts(session)}<p>This payment is made. <a href="${returnAddress(session)}">Go back</a></p>`,
  );
}

function expired(session: Session): Answer {
  const back = session.cancelUrl ? markup`<p><a href="${session.cancelUrl}">Go back</a></p>` : raw('');
  return page('This payment has expired', markup`${facts(session)}<p>Start it again from the order.</p>${back}`, {
    status: 410,
  });
}

function facts(session: Session): Html {
  return markup`<dl>
${session.items.map((item) => markup`<dt>${item.quantity} ×</dt><dd>${item.name}, ${money(item.unitAmountMinor, session.currency)}</dd>`)}
<dt>Total</dt><dd class="sum">${money(session.amountMinor, session.currency)}</dd>
${session.destination ? markup`<dt>Paid on to</dt><dd><code>${session.destination}</code></dd>` : raw('')}
</dl>`;
}

function fieldProblem(fields: URLSearchParams): string | null {
  const expiry = /^(0[1-9]|1[0-2])\s*\/\s*(\d{2})$/.exec((fields.get('expiry') ?? '').trim());
  if (!expiry) return 'The expiry date is incomplete: write it as MM/YY.';
  // A card is good until the end of its month.
  if (Date.UTC(2000 + Number(expiry[2]), Number(expiry[1]), 1) <= Date.now())
    return "Your card's expiry date is in the past.";
  if (!/^\d{3,4}$/.test((fields.get('cvc') ?? '').trim())) return "Your card's security code is incomplete.";
  return null;
}
