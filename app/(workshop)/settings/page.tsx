import type { Metadata } from 'next';
import { AreaLinks } from '@/components/shell/area-links';
import { PageTitle } from '@/components/ui/page-title';
import { SettingsForm } from '@/components/workshop/settings-form';
import { WORKSHOP_LINKS } from '@/components/workshop/workshop-links';
import { ask } from '@/lib/api/ask';
import { getSettings } from '@/lib/workshop/settings';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Settings' };

export default async function SettingsPage() {
  const [settings, me] = await Promise.all([ask(getSettings, {}), ask(whoAmI, {})]);
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Workshop" links={WORKSHOP_LINKS} />}
        title="Settings"
        remainder={settings.name}
        facts={[me.roles.includes('lead') ? 'They hold for everybody in the workshop.' : 'A lead can change them.']}
      />
      <SettingsForm settings={settings} mayChange={me.roles.includes('lead')} />
    </>
  );
}
