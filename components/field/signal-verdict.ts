import type { Verdict } from '@/lib/concrete/judge-reading';

const vibrations: Record<Verdict, number[]> = {
  met: [45],
  'not-met': [160, 70, 160],
  'not-verified': [60, 50, 60, 50, 60],
};

const tones: Record<Verdict, readonly { hz: number; at: number; for: number }[]> = {
  met: [{ hz: 880, at: 0, for: 0.09 }],
  'not-met': [
    { hz: 260, at: 0, for: 0.18 },
    { hz: 220, at: 0.22, for: 0.24 },
  ],
  'not-verified': [
    { hz: 440, at: 0, for: 0.08 },
    { hz: 440, at: 0.14, for: 0.08 },
  ],
};

let audio: AudioContext | null = null;

/** Says a verdict without words: by vibration where the device has it, and by sound where it is switched on. */
export function signalVerdict(verdict: Verdict, sound: boolean): void {
  if (typeof navigator.vibrate === 'function') navigator.vibrate(vibrations[verdict]);
  if (!sound || typeof AudioContext === 'undefined') return;
  audio ??= new AudioContext();
  for (const tone of tones[verdict]) {
    const oscillator = audio.createOscillator();
    const gain = audio.createGain();
    oscillator.frequency.value = tone.hz;
    gain.gain.value = 0.25;
    oscillator.connect(gain).connect(audio.destination);
    oscillator.start(audio.currentTime + tone.at);
    oscillator.stop(audio.currentTime + tone.at + tone.for);
  }
}
