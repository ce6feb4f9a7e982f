import type { Metadata } from 'next';
import { AreaLinks } from '@/components/shell/area-links';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { People } from '@/components/workshop/people';
import { WORKSHOP_LINKS } from '@/components/workshop/workshop-links';
import { ask } from '@/lib/api/ask';
import { listPeople } from '@/lib/workshop/list-people';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const [{ people, invitations }, me] = await Promise.all([ask(listPeople, {}), ask(whoAmI, {})]);
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Workshop" links={WORKSHOP_LINKS} />}
        title="People"
        remainder={me.workshop.name}
        facts={[
          <>
            <Strong mono>{people.length}</Strong> in the workshop
          </>,
          invitations.length > 0 ? (
            <>
              <Strong mono>{invitations.length}</Strong> invited
            </>
          ) : null,
        ]}
      />
      <People people={people} invitations={invitations} mayChange={me.roles.includes('lead')} />
    </>
  );
}
