/** The provider's parameters: application/x-www-form-urlencoded with names such as line_items[0][price_data][currency]. */
import { PaymentRefusal } from './payment-rules';

/** Names as they came, each with one value. */
export type Form = ReadonlyMap<string, string>;

const MOST_PARAMETERS = 1_000;

export function formFrom(body: string): Form {
  const form = new Map<string, string>();
  for (const [name, value] of new URLSearchParams(body)) {
    if (!/^[a-z0-9_]+(?:\[[^[\]]*\])*$/i.test(name))
      throw new PaymentRefusal(400, `Invalid parameter name: ${name.slice(0, 80)}`);
    if (form.has(name)) throw new PaymentRefusal(400, `Received duplicate parameter: ${name}`, { param: name });
    form.set(name, value);
    if (form.size > MOST_PARAMETERS) throw new PaymentRefusal(400, 'Too many parameters');
  }
  return form;
}

/** Refuses what the interface does not know. Patterns have N for an index and * for any one name. */
export function refuseUnknown(form: Form, known: readonly string[]): void {
  const patterns = new Set(known);
  for (const name of form.keys()) {
    const indexed = name.replace(/\[\d+\]/g, '[N]');
    const anyName = indexed.replace(/\[[^[\]]+\]$/, '[*]');
    if (!patterns.has(indexed) && !patterns.has(anyName))
      throw new PaymentRefusal(400, `Received unknown parameter: ${name}`, { code: 'parameter_unknown', param: name });
  }
}

export function requiredText(form: Form, name: string): string {
  const value = form.get(name);
  if (value === undefined || value === '')
    throw new PaymentRefusal(400, `Missing required param: ${name}.`, { code: 'parameter_missing', param: name });
  return value;
}

export function wholeNumber(form: Form, name: string, least: number, most: number): number {
  const text = requiredText(form, name);
  const value = Number(text);
  if (!/^-?\d{1,12}$/.test(text))
    throw new PaymentRefusal(400, `Invalid integer: ${text.slice(0, 40)}`, {
      code: 'parameter_invalid_integer',
      param: name,
    });
  if (value < least)
    throw new PaymentRefusal(400, `This value must be greater than or equal to ${least}.`, {
      code: 'parameter_invalid_integer',
      param: name,
    });
  if (value > most)
    throw new PaymentRefusal(400, `This value must be less than or equal to ${most}.`, {
      code: 'parameter_invalid_integer',
      param: name,
    });
  return value;
}

export function yesOrNo(form: Form, name: string): boolean {
  const text = form.get(name);
  if (text === undefined) return false;
  if (text !== 'true' && text !== 'false')
    throw new PaymentRefusal(400, `Invalid boolean: ${text.slice(0, 40)}`, { param: name });
  return text === 'true';
}

export function oneOf<const Choice extends string>(
  form: Form,
  name: string,
  choices: readonly Choice[],
): Choice | null {
  const text = form.get(name);
  if (text === undefined) return null;
  const choice = choices.find((each) => each === text);
  if (!choice) throw new PaymentRefusal(400, `Invalid ${name}: must be one of ${choices.join(', ')}`, { param: name });
  return choice;
}

/** The members of metadata-like maps, within the provider's limits: 50 keys of 40 characters, values of 500. */
export function mapUnder(form: Form, name: string): Record<string, string> {
  const members: Record<string, string> = {};
  for (const [full, value] of form) {
    if (!full.startsWith(`${name}[`) || !full.endsWith(']')) continue;
    const key = full.slice(name.length + 1, -1);
    if (key.length > 40 || value.length > 500)
      throw new PaymentRefusal(400, 'Metadata keys may have 40 characters and values 500.', { param: full });
    members[key] = value;
  }
  if (Object.keys(members).length > 50) throw new PaymentRefusal(400, 'Metadata may have 50 keys.', { param: name });
  return members;
}
