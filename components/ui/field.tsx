/** Form fields: label above, hint under it, error under the control, all tied together for a screen reader. */
import { useId } from 'react';
import type { InputHTMLAttributes, ReactNode, SelectHTMLAttributes, TextareaHTMLAttributes } from 'react';
import { Glyph } from './glyph';

interface FieldWords {
  readonly label: string;
  readonly hint?: ReactNode;
  /** What is wrong and what would be right; shown and announced. */
  readonly error?: string | undefined;
  /** Keeps the label for screen readers where the place says it already (a field in a table row). */
  readonly hideLabel?: boolean;
  /** Says "if any" beside the label; fields are otherwise taken to be needed. */
  readonly optional?: boolean;
}

export interface FieldAria {
  readonly id: string;
  readonly 'aria-describedby'?: string;
  readonly 'aria-invalid'?: true;
}

/** The frame round any control: the child gets the attributes that tie it to label, hint and error. */
export function Field({
  label,
  hint,
  error,
  hideLabel = false,
  optional = false,
  id,
  children,
}: FieldWords & { readonly id?: string; readonly children: (aria: FieldAria) => ReactNode }) {
  const made = useId();
  const controlId = id ?? made;
  const described = [hint !== undefined ? `${controlId}-hint` : null, error ? `${controlId}-error` : null]
    .filter(Boolean)
    .join(' ');
  return (
    <div className="flex min-w-0 flex-col gap-1">
      <label htmlFor={controlId} className={hideLabel ? 'sr-only' : 'text-small font-semibold'}>
        {label}
        {optional ? <span className="font-normal text-soft"> (if any)</span> : null}
      </label>
      {hint !== undefined ? (
        <p id={`${controlId}-hint`} className="text-fine text-soft">
          {hint}
        </p>
      ) : null}
      {children({
        id: controlId,
        ...(described === '' ? {} : { 'aria-describedby': described }),
        ...(error ? { 'aria-invalid': true as const } : {}),
      })}
      {error ? (
        <p id={`${controlId}-error`} className="flex items-start gap-1.5 text-small text-oxide">
          <Glyph name="refused" size={13} className="mt-1" />
          <span>{error}</span>
        </p>
      ) : null}
    </div>
  );
}

const CONTROL =
  'w-full min-w-0 border border-edge bg-sheet px-2.5 py-1.5 text-ink min-h-9 aria-invalid:border-oxide aria-invalid:border-2 disabled:bg-hair disabled:text-soft read-only:bg-paper max-sm:min-h-12 max-sm:text-[1rem]';

type Own = 'className' | 'children' | 'id';

export function TextField({
  label,
  hint,
  error,
  hideLabel,
  optional,
  id,
  mono = false,
  ...rest
}: FieldWords &
  Omit<InputHTMLAttributes<HTMLInputElement>, Own> & {
    readonly id?: string;
    /** For values, designators and codes. */
    readonly mono?: boolean;
    readonly ref?: React.Ref<HTMLInputElement>;
  }) {
  return (
    <Field label={label} hint={hint} error={error} {...optionals({ hideLabel, optional, id })}>
      {(aria) => (
        <input type="text" autoComplete="off" {...rest} {...aria} className={`${CONTROL} ${mono ? 'font-mono' : ''}`} />
      )}
    </Field>
  );
}

/** Whole numbers bring up the number pad on a phone; `unit` stands inside the field's right edge. */
export function NumberField({
  label,
  hint,
  error,
  hideLabel,
  optional,
  id,
  unit,
  whole = true,
  ...rest
}: FieldWords &
  Omit<InputHTMLAttributes<HTMLInputElement>, Own | 'type' | 'inputMode'> & {
    readonly id?: string;
    readonly unit?: string;
    readonly whole?: boolean;
    readonly ref?: React.Ref<HTMLInputElement>;
  }) {
  return (
    <Field
      label={unit === undefined ? label : `${label}, ${unit}`}
      hint={hint}
      error={error}
      {...optionals({ hideLabel, optional, id })}
    >
      {(aria) => (
        // Text with a numeric keyboard: type=number changes its value under a turning wheel and swallows what it cannot read.
        <input
          type="text"
          inputMode={whole ? 'numeric' : 'decimal'}
          autoComplete="off"
          {...rest}
          {...aria}
          className={`${CONTROL} text-right font-mono`}
        />
      )}
    </Field>
  );
}

export function SelectField({
  label,
  hint,
  error,
  hideLabel,
  optional,
  id,
  options,
  ...rest
}: FieldWords &
  Omit<SelectHTMLAttributes<HTMLSelectElement>, Own> & {
    readonly id?: string;
    readonly options: readonly { readonly value: string; readonly label: string; readonly disabled?: boolean }[];
    readonly ref?: React.Ref<HTMLSelectElement>;
  }) {
  return (
    <Field label={label} hint={hint} error={error} {...optionals({ hideLabel, optional, id })}>
      {(aria) => (
        <span className="relative block">
          <select {...rest} {...aria} className={`${CONTROL} appearance-none pr-8`}>
            {options.map((option) => (
              <option key={option.value} value={option.value} disabled={option.disabled}>
                {option.label}
              </option>
            ))}
          </select>
          <Glyph name="down" className="pointer-events-none absolute top-1/2 right-2.5 -translate-y-1/2 text-soft" />
        </span>
      )}
    </Field>
  );
}

export function TextArea({
  label,
  hint,
  error,
  hideLabel,
  optional,
  id,
  mono = false,
  ...rest
}: FieldWords &
  Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, Own> & {
    readonly id?: string;
    readonly mono?: boolean;
    readonly ref?: React.Ref<HTMLTextAreaElement>;
  }) {
  return (
    <Field label={label} hint={hint} error={error} {...optionals({ hideLabel, optional, id })}>
      {(aria) => <textarea rows={4} {...rest} {...aria} className={`${CONTROL} ${mono ? 'font-mono' : ''}`} />}
    </Field>
  );
}

export function CheckboxField({
  label,
  hint,
  error,
  id,
  ...rest
}: Pick<FieldWords, 'label' | 'hint' | 'error'> &
  Omit<InputHTMLAttributes<HTMLInputElement>, Own | 'type'> & {
    readonly id?: string;
    readonly ref?: React.Ref<HTMLInputElement>;
  }) {
  const made = useId();
  const controlId = id ?? made;
  const described = [hint !== undefined ? `${controlId}-hint` : null, error ? `${controlId}-error` : null]
    .filter(Boolean)
    .join(' ');
  return (
    <div className="grid grid-cols-[auto_1fr] content-start gap-x-2.5">
      <input
        {...rest}
        id={controlId}
        type="checkbox"
        aria-describedby={described === '' ? undefined : described}
        aria-invalid={error ? true : undefined}
        className="mt-0.5 size-[18px] max-sm:size-6"
      />
      <label htmlFor={controlId} className="max-sm:py-0.5">
        {label}
      </label>
      {hint !== undefined ? (
        <p id={`${controlId}-hint`} className="col-start-2 text-fine text-soft">
          {hint}
        </p>
      ) : null}
      {error ? (
        <p id={`${controlId}-error`} className="col-start-2 text-small text-oxide">
          {error}
        </p>
      ) : null}
    </div>
  );
}

/** Leaves out what was not given, so that the frame's own defaults hold. */
function optionals(given: {
  hideLabel?: boolean | undefined;
  optional?: boolean | undefined;
  id?: string | undefined;
}) {
  return {
    ...(given.hideLabel === undefined ? {} : { hideLabel: given.hideLabel }),
    ...(given.optional === undefined ? {} : { optional: given.optional }),
    ...(given.id === undefined ? {} : { id: given.id }),
  };
}
