import { databaseAnswers } from '@/db/client';
import { jobsAnswer } from '@/lib/services/jobs';

export const dynamic = 'force-dynamic';

/** 200 when the database and the job process answer; 503 with what does not. Open to load balancers, so it says nothing more. */
export async function GET(): Promise<Response> {
  const database = await databaseAnswers().catch(() => false);
  const jobs = database && (await jobsAnswer().catch(() => false));
  const well = database && jobs;
  return Response.json(
    { database, jobs },
    { status: well ? 200 : 503, headers: { 'cache-control': 'no-store', ...(well ? {} : { 'retry-after': '5' }) } },
  );
}
