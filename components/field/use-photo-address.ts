'use client';

import { useEffect, useState } from 'react';
import { useDevice } from './use-device';

/** Where a photo can be shown from: its bytes on the device, or the server's address. Null while unknown, or offline. */
export function usePhotoAddress(photoId: string): string | null {
  const device = useDevice();
  const [found, setFound] = useState<{ photoId: string; address: string | null } | null>(null);
  useEffect(() => {
    let wanted = true;
    device.photoAddress(photoId).then(
      (address) => wanted && setFound({ photoId, address }),
      () => wanted && setFound({ photoId, address: null }),
    );
    return () => {
      wanted = false;
    };
  }, [device, photoId]);
  return found?.photoId === photoId ? found.address : null;
}
