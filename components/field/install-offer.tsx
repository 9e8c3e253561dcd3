'use client';

import { Button } from '@/components/ui/button';
import { useInstallOffer } from './use-install-offer';

/** Offers to install the application, where the browser does. */
export function InstallOffer() {
  const install = useInstallOffer();
  if (!install) return null;
  return (
    <section className="grid gap-2 border border-ink bg-sheet p-3">
      <h2 className="text-heading">Install on this device</h2>
      <p>
        It then opens from the home screen, without a network, and the browser is less likely to clear what is
        kept when room is short.
      </p>
      <Button onClick={() => void install()}>Install</Button>
    </section>
  );
}
