import type { SyncState } from '@/lib/device/device-types';
import type { FixLanguage } from './fix-list-words';

interface BarWords {
  back: (to: string) => string;
  pours: string;
  handOver: string;
  allSent: string;
  notSent: (count: number) => string;
  refused: (count: number) => string;
  waits: string;
  seeWhy: string;
  phases: Record<SyncState['phase'], string>;
}

/** What the bar over every screen says, in the languages of the fix list. Spanish from memory of the trade. */
export const barWords: Record<FixLanguage, BarWords> = {
  en: {
    back: (to) => `Back to ${to}`,
    pours: 'pours',
    handOver: 'Hand over',
    allSent: 'all sent',
    notSent: (count) => `${count} not sent yet`,
    refused: (count) => `${count} refused`,
    waits: 'waits to be sent',
    seeWhy: 'see why',
    phases: {
      idle: 'up to date',
      sending: 'sending',
      fetching: 'fetching',
      offline: 'no network',
      'sign-in-needed': 'sign in to send',
      'server-trouble': 'server does not answer',
      'strange-network': 'network asks for a sign-in',
    },
  },
  es: {
    back: (to) => `Volver a ${to}`,
    pours: 'los vaciados',
    handOver: 'Entregar',
    allSent: 'todo enviado',
    notSent: (count) => `${count} sin enviar`,
    refused: (count) => (count === 1 ? '1 rechazado' : `${count} rechazados`),
    waits: 'espera envío',
    seeWhy: 'vea por qué',
    phases: {
      idle: 'al día',
      sending: 'enviando',
      fetching: 'recibiendo',
      offline: 'sin red',
      'sign-in-needed': 'entre para enviar',
      'server-trouble': 'el servidor no responde',
      'strange-network': 'la red pide entrar',
    },
  },
};
