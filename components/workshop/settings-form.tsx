'use client';
/** The workshop's rules in one form; client because what was typed must survive a refusal. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, SelectField, TextArea } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { changeSettings } from '@/lib/workshop/settings';

interface Settings {
  readonly currency: string;
  readonly approvalLimitMinor: number;
  readonly taperConvention: 'ask' | 'letters' | 'old-european';
  readonly overDeliveryPercent: number;
  readonly letterhead: string;
}

const TAPERS = [
  { value: 'ask', label: 'Ask about a bare A or B every time' },
  { value: 'letters', label: 'A is logarithmic, B is linear (current makers)' },
  { value: 'old-european', label: 'A is linear, B is logarithmic (old European parts)' },
] as const;

/** Whole cents from what a person types (`250`, `250.00`, `250,5`); null where it is no amount. */
function minorFrom(text: string): number | null {
  const form = /^(\d{1,7})(?:[.,](\d{1,2}))?$/.exec(text.trim());
  return form ? Number(form[1]) * 100 + Number((form[2] ?? '').padEnd(2, '0')) : null;
}

export function SettingsForm({ settings, mayChange }: { readonly settings: Settings; readonly mayChange: boolean }) {
  const router = useRouter();
  const say = useSay();
  const [limit, setLimit] = useState((settings.approvalLimitMinor / 100).toFixed(2));
  const [taper, setTaper] = useState<Settings['taperConvention']>(settings.taperConvention);
  const [over, setOver] = useState(String(settings.overDeliveryPercent));
  const [letterhead, setLetterhead] = useState(settings.letterhead);
  const change = useCommand<typeof changeSettings>('PATCH /settings');
  const limitMinor = minorFrom(limit);
  const overPercent = /^\d{1,3}$/.test(over) && Number(over) <= 100 ? Number(over) : null;

  function submit(event: FormEvent) {
    event.preventDefault();
    if (limitMinor === null || overPercent === null) return;
    change.mutate(
      { approvalLimitMinor: limitMinor, taperConvention: taper, overDeliveryPercent: overPercent, letterhead },
      {
        onSuccess: () => {
          say('The settings hold from now on');
          router.refresh();
        },
      },
    );
  }

  return (
    <form onSubmit={submit} className="max-w-[36rem]">
      <fieldset disabled={!mayChange} className="flex flex-col gap-4">
        <legend className="sr-only">Rules of the workshop</legend>
        {change.error ? (
          <Notice tone="stop" announce title="Nothing was changed">
            {change.error.details.detail}
          </Notice>
        ) : null}
        <NumberField
          label="Orders above this need a lead"
          hint="Total with postage. A lead who submitted an order can’t approve it."
          unit={settings.currency}
          whole={false}
          value={limit}
          onChange={(event) => setLimit(event.target.value)}
          error={limitMinor === null ? 'An amount such as 250.00' : undefined}
        />
        <NumberField
          label="A delivery may exceed its order by"
          unit="percent"
          value={over}
          onChange={(event) => setOver(event.target.value)}
          error={overPercent === null ? 'A whole number from 0 to 100' : undefined}
        />
        <SelectField
          label="Taper letters on potentiometers"
          value={taper}
          options={TAPERS}
          onChange={(event) => setTaper(TAPERS.find((one) => one.value === event.target.value)?.value ?? 'ask')}
        />
        <TextArea
          label="Letterhead on orders"
          hint="Address and what else suppliers should see under the name."
          rows={4}
          value={letterhead}
          onChange={(event) => setLetterhead(event.target.value)}
        />
        {mayChange ? (
          <div>
            <Button type="submit" kind="primary" busy={change.isPending} busyWord="Saving …">
              Save the settings
            </Button>
          </div>
        ) : null}
      </fieldset>
    </form>
  );
}
