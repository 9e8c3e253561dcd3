'use client';

import { useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { PhotoImage } from './photo-image';
import { usePhotoAddress } from './use-photo-address';

/**
 * The camera with the earlier picture faintly over it, so that the second is taken from the same place. Where the
 * browser gives no camera picture, the earlier one is shown beside instead and the ordinary button takes the photo.
 */
export function PhotoOverlay({ photoId, onTake }: { photoId: string; onTake: (file: File) => void }) {
  const earlier = usePhotoAddress(photoId);
  const [stream, setStream] = useState<MediaStream | null>(null);
  const [refused, setRefused] = useState(false);
  const video = useRef<HTMLVideoElement>(null);

  useEffect(() => {
    if (video.current) video.current.srcObject = stream;
    return () => stream?.getTracks().forEach((track) => track.stop());
  }, [stream]);

  const start = async () => {
    try {
      setStream(
        await navigator.mediaDevices.getUserMedia({ video: { facingMode: 'environment' }, audio: false }),
      );
    } catch {
      setRefused(true);
    }
  };
  const shoot = () => {
    const source = video.current;
    if (!source) return;
    const canvas = document.createElement('canvas');
    canvas.width = source.videoWidth;
    canvas.height = source.videoHeight;
    canvas.getContext('2d')?.drawImage(source, 0, 0);
    canvas.toBlob(
      (blob) => {
        if (!blob) return;
        onTake(new File([blob], 'after.jpg', { type: blob.type }));
        setStream(null);
      },
      'image/jpeg',
      0.92,
    );
  };

  if (!earlier) return null;
  return (
    <div className="grid gap-2">
      {stream ? (
        <>
          <div className="relative border border-ink">
            <video ref={video} autoPlay playsInline muted className="w-full" />
            <PhotoImage
              src={earlier}
              alt="The earlier picture"
              className="absolute inset-0 size-full object-cover opacity-35"
            />
          </div>
          <div className="grid grid-cols-[2fr_1fr] gap-2">
            <Button variant="primary" className="min-h-15" onClick={shoot}>
              Take it from the same place
            </Button>
            <Button onClick={() => setStream(null)}>Close the camera</Button>
          </div>
        </>
      ) : (
        <>
          <PhotoImage
            src={earlier}
            alt="The earlier picture, to be matched"
            className="max-h-64 w-full border border-rule object-contain"
          />
          {refused ? (
            <p className="text-label text-pencil">
              The camera picture cannot be shown here. Match this one by eye and use the button below.
            </p>
          ) : (
            typeof navigator.mediaDevices?.getUserMedia === 'function' && (
              <Button onClick={() => void start()}>Camera with the earlier picture over it</Button>
            )
          )}
        </>
      )}
    </div>
  );
}
