'use client';

import { Ellipsis } from 'lucide-react';
import { useState } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import { Dialog } from '@/components/ui/dialog';
import { Menu } from '@/components/ui/menu';
import { Sheet } from '@/components/ui/sheet';
import { Tabs } from '@/components/ui/tabs';

type Open = 'dialog' | 'drawer' | 'confirm' | null;

export function Dialogs() {
  const [open, setOpen] = useState<Open>(null);
  const follow = (name: Open) => (isOpen: boolean) => setOpen(isOpen ? name : null);
  const undo = { label: 'Undo', onClick: () => toast('Taken back.') };
  return (
    <Sheet title="What opens over the page">
      <div className="flex flex-wrap items-center gap-3">
        <Button onClick={() => setOpen('dialog')}>A dialog</Button>
        <Button onClick={() => setOpen('drawer')}>A drawer</Button>
        <Button onClick={() => setOpen('confirm')}>Consequences</Button>
        <Button onClick={() => toast.success('Marked as here.', { action: undo })}>A message with Undo</Button>
        <Button onClick={() => toast.error('This did not reach the school. Press again.')}>A message of failure</Button>
        <Menu trigger={<Button icon={<Ellipsis size={16} aria-hidden />}>Menu</Button>} items={[{ key: 'move', label: 'Move the lesson', onSelect: () => toast('Chosen: move') }, { key: 'cancel', label: 'Call it off', onSelect: () => toast('Chosen: call off'), disabled: true }]} />
      </div>
      <div className="mt-5">
        <Tabs label="An example" tabs={[{ key: 'one', label: 'Lessons', content: <p>Arrow keys move between the tabs.</p> }, { key: 'two', label: 'Bills', content: <p>Only the chosen one is shown.</p> }]} />
      </div>
      <Dialog open={open === 'dialog'} onOpenChange={follow('dialog')} title="A dialog" description="Escape closes it; the focus stays inside and goes back to the button."><p>On a phone it comes from below.</p></Dialog>
      <Dialog open={open === 'drawer'} onOpenChange={follow('drawer')} title="A drawer" side="right"><p>For a record beside the list it belongs to.</p></Dialog>
      <ConfirmDialog open={open === 'confirm'} onOpenChange={follow('confirm')} title="Release the bills?" confirmLabel="Release 108 bills" kind="brass" onConfirm={() => setOpen(null)}
        consequences={['108 families get an invoice, €31,240.00 together.', '112 mails are sent.', '2 bills are held back.']} />
    </Sheet>
  );
}
