import { openApi } from '@/lib/api/openapi';
import { useCases } from '@/lib/registry';

export const dynamic = 'force-dynamic';

export function GET(): Response {
  return Response.json(openApi(useCases, process.env.NEXTAUTH_URL ?? ''));
}
