import type { Metadata } from 'next';
import { AreaLinks } from '@/components/shell/area-links';
import { PageTitle } from '@/components/ui/page-title';
import { Tokens } from '@/components/workshop/tokens';
import { WORKSHOP_LINKS } from '@/components/workshop/workshop-links';
import { ask } from '@/lib/api/ask';
import { listTokens } from '@/lib/workshop/api-tokens';

export const metadata: Metadata = { title: 'API tokens' };

export default async function TokensPage() {
  const tokens = await ask(listTokens, {});
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Workshop" links={WORKSHOP_LINKS} />}
        title="API tokens"
        facts={[
          'Each acts as you, with your roles, for half a year.',
          <a key="api" href="/api/openapi.json" className="text-copper underline underline-offset-2">
            What the API can do
          </a>,
        ]}
      />
      <Tokens tokens={tokens} />
    </>
  );
}
