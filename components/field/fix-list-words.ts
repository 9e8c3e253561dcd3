import type { FixItem } from '@/lib/inspection/fix-list-item';

export const fixLanguages = ['en', 'es'] as const;
export type FixLanguage = (typeof fixLanguages)[number];

interface Words {
  heading: string;
  nothing: string;
  report: string;
  print: string;
  share: string;
  language: string;
  pour: string;
  element: string;
  location: string;
  planned: string;
  drawing: string;
  afterwards: string;
  asTyped: string;
  extent: string;
  awaited: string;
  waitsToBeSent: string;
  noList: string;
  fromLeftAndUp: (left: string, up: string) => string;
  photo: string;
  photoNotHere: string;
  photoTake: string;
  photoFromFiles: string;
  photoKept: string;
  photoOfIt: string;
  photoBusy: string;
  putRight: string;
  tickSome: string;
  askedToDecide: string;
  whatWasDone: string;
  writeSomething: string;
  reportIt: string;
  reported: string;
  reportedThen: string;
  back: string;
  gone: string;
}

/** The fix list's own words; what people typed stays as they typed it. Spanish from memory of the trade. */
export const fixListWords: Record<FixLanguage, Words> = {
  en: {
    heading: 'Fix list',
    nothing: 'Nothing to put right.',
    report: 'Report the correction',
    print: 'Print',
    share: 'Share',
    language: 'English',
    pour: 'Pour',
    element: 'Element',
    location: 'Location',
    planned: 'Planned',
    drawing: 'Drawing',
    afterwards: 'Report each with a photo. The inspector then looks again.',
    asTyped: '',
    extent: 'Extent',
    awaited: 'Reported, the inspector looks again',
    waitsToBeSent: 'Reported. It is sent when there is a network.',
    noList: 'The list is not on this device yet. It comes as soon as there is a network.',
    fromLeftAndUp: (left, up) => `${left} from the left, ${up} up`,
    photo: 'Photo',
    photoNotHere: 'The photo is shown when there is a network.',
    photoTake: 'Take the photo',
    photoFromFiles: 'From files',
    photoKept: 'Photo kept on this device.',
    photoOfIt: 'A photo of it as it is now',
    photoBusy: 'Making it smaller and keeping it',
    putRight: 'What was put right',
    tickSome: 'Tick what was put right.',
    askedToDecide: 'the engineer is asked to decide on it',
    whatWasDone: 'What was done',
    writeSomething: 'Write what was done.',
    reportIt: 'Report it',
    reported: 'Reported',
    reportedThen: 'The inspector looks again. Add a photo that shows it as it is now.',
    back: 'To the list',
    gone: 'This is not on the list any more.',
  },
  es: {
    heading: 'Lista de correcciones',
    nothing: 'No hay nada que corregir.',
    report: 'Avisar que está corregido',
    print: 'Imprimir',
    share: 'Compartir',
    language: 'Español',
    pour: 'Vaciado',
    element: 'Elemento',
    location: 'Lugar',
    planned: 'Previsto',
    drawing: 'Plano',
    afterwards: 'Avise de cada una con una foto. Después el inspector vuelve a revisar.',
    asTyped: 'Lo escrito por las personas queda en su idioma.',
    extent: 'Alcance',
    awaited: 'Avisado, el inspector vuelve a revisar',
    waitsToBeSent: 'Avisado. Se envía cuando haya red.',
    noList: 'La lista todavía no está en este dispositivo. Llega en cuanto haya red.',
    fromLeftAndUp: (left, up) => `${left} desde la izquierda, ${up} hacia arriba`,
    photo: 'Foto',
    photoNotHere: 'La foto se muestra cuando haya red.',
    photoTake: 'Tomar la foto',
    photoFromFiles: 'De archivos',
    photoKept: 'Foto guardada en este dispositivo.',
    photoOfIt: 'Una foto de cómo está ahora',
    photoBusy: 'Reduciendo y guardando la foto',
    putRight: 'Qué se corrigió',
    tickSome: 'Marque lo que se corrigió.',
    askedToDecide: 'se pidió al ingeniero que decida',
    whatWasDone: 'Qué se hizo',
    writeSomething: 'Escriba qué se hizo.',
    reportIt: 'Avisar',
    reported: 'Avisado',
    reportedThen: 'El inspector vuelve a revisar. Agregue una foto de cómo está ahora.',
    back: 'A la lista',
    gone: 'Esto ya no está en la lista.',
  },
};

const decisions: Record<FixLanguage, Record<'rework' | 'repair' | 'reject', string>> = {
  en: { rework: 'Rework', repair: 'Repair', reject: 'Take out' },
  es: { rework: 'Rehacer', repair: 'Reparar', reject: 'Retirar' },
};

/** What one item says, as a line and what stands under it. */
export function fixItemWords({ what }: FixItem, language: FixLanguage): { title: string; lines: string[] } {
  const english = language === 'en';
  switch (what.kind) {
    case 'cover': {
      const title = english
        ? `Cover too ${what.high ? 'large' : 'small'}: accepted ${what.high ? 'to' : 'from'} ${what.accepted}`
        : `Recubrimiento ${what.high ? 'excesivo' : 'insuficiente'}: se acepta ${what.high ? 'hasta' : 'desde'} ${what.accepted}`;
      return { title, lines: what.values.map(({ label, value }) => `${label}: ${value}`) };
    }
    case 'depth':
      return {
        title: english
          ? `Effective depth too small: planned ${what.planned}`
          : `Canto útil insuficiente: previsto ${what.planned}`,
        lines: what.values.map(({ label, value }) => `${label}: ${value}`),
      };
    case 'measurement': {
      const limits = english
        ? [what.least && `at least ${what.least}`, what.most && `at most ${what.most}`]
        : [what.least && `mínimo ${what.least}`, what.most && `máximo ${what.most}`];
      return {
        title: `${what.title}: ${limits.filter(Boolean).join(', ')}`,
        lines: what.values.map((value) => (english ? `Found ${value}` : `Encontrado ${value}`)),
      };
    }
    case 'check':
      return {
        title: `${english ? 'Not met' : 'No cumple'}: ${what.question}`,
        lines: what.note ? [what.note] : [],
      };
    case 'nonconformance': {
      const head = what.decision
        ? decisions[language][what.decision]
        : english
          ? 'Nonconformance'
          : 'No conformidad';
      return {
        title: `${head}: ${what.title}`,
        lines: [what.reason, what.extent && `${fixListWords[language].extent}: ${what.extent}`].filter(
          Boolean,
        ),
      };
    }
  }
}

/** The whole list as plain text, to be shared. */
export function fixListText(
  items: readonly FixItem[],
  head: { number: string; title: string; planned: string },
  language: FixLanguage,
): string {
  const words = fixListWords[language];
  const lines = items.flatMap((item, index) => {
    const { title, lines: under } = fixItemWords(item, language);
    return [`${index + 1}. ${title}`, `   ${item.where}`, ...under.map((line) => `   ${line}`)];
  });
  return [
    `${words.heading}: ${head.number} ${head.title}`,
    head.planned && `${words.planned}: ${head.planned}`,
    '',
    ...(lines.length > 0 ? lines : [words.nothing]),
    '',
    items.length > 0 && words.afterwards,
  ]
    .filter((line) => line !== false)
    .join('\n')
    .trim();
}
