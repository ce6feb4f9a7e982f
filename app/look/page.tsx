/** Every piece of the look on one page, for looking at it hard in both themes. Development only. */
import { notFound } from 'next/navigation';
import { LookDrawings } from './look-drawings';
import { LookGrid } from './look-grid';
import { LookPieces } from './look-pieces';
import { WorkshopShell } from '@/components/shell/workshop-shell';

export const metadata = { title: 'Look' };

export default function LookPage() {
  if (process.env.NODE_ENV === 'production') notFound();
  return (
    <WorkshopShell
      workshop={{ id: 'a', name: 'Fernhollow Synth Works' }}
      workshops={[
        { id: 'a', name: 'Fernhollow Synth Works' },
        { id: 'b', name: 'Second Bench' },
      ]}
      person={{ name: 'I. Marlow', roles: ['storekeeper', 'buyer'] }}
      banner="Local stand-ins: no money moves, no mail leaves this machine."
    >
      <LookPieces />
      <LookDrawings />
      <LookGrid />
    </WorkshopShell>
  );
}
