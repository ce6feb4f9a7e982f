'use client';
/** The pieces that take functions. */
import { Button } from '@/components/ui/button';
import { Dialog, DialogClose } from '@/components/ui/dialog';
import { KeyPad } from '@/components/ui/key-pad';
import { useSay } from '@/components/ui/status-line';

export function LookDialog() {
  const say = useSay();
  return (
    <Dialog
      title="Withdraw order 2026-0041?"
      description="Quillfern Parts is told by mail; the lines become short again."
      trigger={<Button>Open a dialog</Button>}
      actions={
        <>
          <DialogClose>
            <Button>Keep it</Button>
          </DialogClose>
          <DialogClose>
            <Button kind="danger" onClick={() => say('Order 2026-0041 is withdrawn')}>
              Withdraw
            </Button>
          </DialogClose>
        </>
      }
    >
      <p>Nothing has been paid yet.</p>
    </Dialog>
  );
}

export function LookPad() {
  const say = useSay();
  return (
    <div className="max-w-xs">
      <KeyPad
        label="How many are there"
        onEnter={(value) => say({ text: `Counted ${value}`, action: { word: 'Undo', run: () => undefined } })}
        unit="pieces"
      />
    </div>
  );
}
