/** Reads the parameters of the two requests that change something, with the provider's rules and limits. */
import { type Form, mapUnder, oneOf, refuseUnknown, requiredText, wholeNumber, yesOrNo } from './payment-form';
import { type LineItem } from './payment-records';
import { PaymentRefusal, type PaymentRules } from './payment-rules';

const SESSION_PARAMETERS = [
  'mode',
  'ui_mode',
  'success_url',
  'cancel_url',
  'client_reference_id',
  'customer_email',
  'expires_at',
  'locale',
  'submit_type',
  'metadata[*]',
  'payment_method_types[N]',
  'expand[N]',
  'line_items[N][quantity]',
  'line_items[N][price_data][currency]',
  'line_items[N][price_data][unit_amount]',
  'line_items[N][price_data][product_data][name]',
  'line_items[N][price_data][product_data][description]',
  'payment_intent_data[description]',
  'payment_intent_data[metadata][*]',
  'payment_intent_data[application_fee_amount]',
  'payment_intent_data[transfer_data][destination]',
  'payment_intent_data[on_behalf_of]',
  'payment_intent_data[transfer_group]',
];

const REFUND_PARAMETERS = [
  'payment_intent',
  'charge',
  'amount',
  'reason',
  'reverse_transfer',
  'refund_application_fee',
  'metadata[*]',
  'expand[N]',
];

// Smallest charge by settlement currency, as the provider publishes it; one minor unit where it names none here.
const LEAST_MINOR: Record<string, number> = {
  usd: 50,
  eur: 50,
  gbp: 30,
  chf: 50,
  sek: 300,
  dkk: 250,
  nok: 300,
  jpy: 50,
};
// At most eight digits.
const MOST_MINOR = 99_999_999;
const MOST_LINE_ITEMS = 100;
const HALF_HOUR_SECONDS = 1_800;
const DAY_SECONDS = 86_400;

type NewSession = Parameters<PaymentRules['createSession']>[0];

/** Throws PaymentRefusal in the provider's words. */
export function readSession(form: Form): NewSession {
  refuseUnknown(form, SESSION_PARAMETERS);
  if (requiredText(form, 'mode') !== 'payment')
    throw new PaymentRefusal(400, 'The stand-in knows mode=payment only.', { param: 'mode' });
  if ((form.get('ui_mode') ?? 'hosted_page') !== 'hosted_page')
    throw new PaymentRefusal(400, 'The stand-in knows ui_mode=hosted_page only.', { param: 'ui_mode' });
  const successUrl = webAddress(form, 'success_url') ?? requiredText(form, 'success_url');
  const items = lineItems(form);
  const first = requiredText(form, 'line_items[0][price_data][currency]');
  const amountMinor = items.reduce((sum, item) => sum + item.unitAmountMinor * item.quantity, 0);
  const leastMinor = LEAST_MINOR[first] ?? 1;
  if (amountMinor < leastMinor)
    throw new PaymentRefusal(
      400,
      `The Checkout Session's total amount due must add up to at least ${leastMinor} in minor units of ${first}.`,
      { code: 'amount_too_small' },
    );
  if (amountMinor > MOST_MINOR)
    throw new PaymentRefusal(400, 'The total amount must be no more than eight digits.', { code: 'amount_too_large' });
  const feeName = 'payment_intent_data[application_fee_amount]';
  const destination = accountOf(form, 'payment_intent_data[transfer_data][destination]');
  const feeMinor = form.has(feeName) ? wholeNumber(form, feeName, 0, amountMinor) : null;
  if (feeMinor !== null && !destination)
    throw new PaymentRefusal(400, 'An application fee needs a connected account.', { param: feeName });
  return {
    amountMinor,
    currency: first,
    items,
    successUrl,
    cancelUrl: webAddress(form, 'cancel_url'),
    clientReference: shortText(form, 'client_reference_id', 200),
    customerEmail: email(form),
    description: shortText(form, 'payment_intent_data[description]', 1_000),
    metadata: mapUnder(form, 'metadata'),
    intentMetadata: mapUnder(form, 'payment_intent_data[metadata]'),
    destination,
    feeMinor,
    expiresSeconds: expiry(form),
  };
}

type NewRefund = Parameters<PaymentRules['refund']>[0];

/** Throws PaymentRefusal in the provider's words. */
export function readRefund(form: Form): NewRefund {
  refuseUnknown(form, REFUND_PARAMETERS);
  const intentId = form.get('payment_intent') ?? null;
  const chargeId = form.get('charge') ?? null;
  if (intentId === null && chargeId === null)
    throw new PaymentRefusal(
      400,
      'One of the following params should be provided for this request: payment_intent or charge.',
    );
  if (intentId !== null && chargeId !== null)
    throw new PaymentRefusal(400, 'You may only specify one of these parameters: payment_intent, charge.');
  return {
    intentId,
    chargeId,
    amountMinor: form.has('amount') ? wholeNumber(form, 'amount', 1, MOST_MINOR) : null,
    reason: oneOf(form, 'reason', ['duplicate', 'fraudulent', 'requested_by_customer']),
    reverseTransfer: yesOrNo(form, 'reverse_transfer'),
    metadata: mapUnder(form, 'metadata'),
  };
}

function lineItems(form: Form): LineItem[] {
  const count = new Set([...form.keys()].flatMap((name) => /^line_items\[(\d+)\]/.exec(name)?.[1] ?? [])).size;
  if (count === 0)
    throw new PaymentRefusal(400, 'Missing required param: line_items.', {
      code: 'parameter_missing',
      param: 'line_items',
    });
  if (count > MOST_LINE_ITEMS)
    throw new PaymentRefusal(400, `At most ${MOST_LINE_ITEMS} line items.`, { param: 'line_items' });
  const currency = requiredText(form, 'line_items[0][price_data][currency]');
  if (!CURRENCIES.has(currency))
    throw new PaymentRefusal(400, `Invalid currency: ${currency.slice(0, 10)}.`, {
      param: 'line_items[0][price_data][currency]',
    });
  return Array.from({ length: count }, (_, at) => {
    const under = `line_items[${at}]`;
    if (requiredText(form, `${under}[price_data][currency]`) !== currency)
      throw new PaymentRefusal(400, 'All line items must have the same currency.', {
        param: `${under}[price_data][currency]`,
      });
    return {
      name: requiredText(form, `${under}[price_data][product_data][name]`),
      unitAmountMinor: wholeNumber(form, `${under}[price_data][unit_amount]`, 0, MOST_MINOR),
      quantity: form.has(`${under}[quantity]`) ? wholeNumber(form, `${under}[quantity]`, 1, 999_999) : 1,
    };
  });
}

// ISO 4217 codes as the runtime knows them; the provider wants lower case.
const CURRENCIES = new Set(Intl.supportedValuesOf('currency').map((code) => code.toLowerCase()));

function webAddress(form: Form, name: string): string | null {
  const value = form.get(name);
  if (value === undefined) return null;
  // The placeholder is legal in the address although its braces are not legal in a URL.
  const plain = value.replace('{CHECKOUT_SESSION_ID}', 'id');
  if (!URL.canParse(plain) || !/^https?:$/.test(new URL(plain).protocol))
    throw new PaymentRefusal(400, 'Not a valid URL', { code: 'url_invalid', param: name });
  return value;
}

function accountOf(form: Form, name: string): string | null {
  const account = form.get(name);
  if (account === undefined) return null;
  if (!/^acct_\w{4,}$/.test(account))
    throw new PaymentRefusal(400, `No such destination: '${account.slice(0, 80)}'`, {
      code: 'resource_missing',
      param: name,
    });
  return account;
}

function shortText(form: Form, name: string, most: number): string | null {
  const value = form.get(name) ?? null;
  if (value !== null && value.length > most)
    throw new PaymentRefusal(400, `Invalid string: at most ${most} characters.`, { param: name });
  return value;
}

function email(form: Form): string | null {
  const value = form.get('customer_email') ?? null;
  if (value !== null && !/^[^@\s]+@[^@\s]+\.[^@\s]+$/.test(value))
    throw new PaymentRefusal(400, `Invalid email address: ${value.slice(0, 80)}`, {
      code: 'email_invalid',
      param: 'customer_email',
    });
  return value;
}

function expiry(form: Form): number {
  const now = Math.floor(Date.now() / 1000);
  if (!form.has('expires_at')) return now + DAY_SECONDS;
  const at = wholeNumber(form, 'expires_at', 0, 99_999_999_999);
  if (at < now + HALF_HOUR_SECONDS - 5 || at > now + DAY_SECONDS + 5)
    throw new PaymentRefusal(
      400,
      'The expires_at timestamp must be between 30 minutes and 24 hours from Checkout Session creation.',
      { param: 'expires_at' },
    );
  return at;
}
