/** What the reading screen was last set to, kept on this device so that it costs no tap per reading. */
export interface ReadingSettings {
  instrumentId: string | null;
  unit: 'mm' | 'in' | null;
  /** Requirement read to, by face. */
  steel: Record<string, string>;
  /** Size of the go/no-go block in mm. */
  blockMm: number | null;
  sound: boolean;
  /** Who reads while another types; null: who types. It holds for that typist only, whoever takes the device next. */
  readBy: { typistId: string; personId: string } | null;
}

export const noSettings: ReadingSettings = {
  instrumentId: null,
  unit: null,
  steel: {},
  blockMm: null,
  sound: false,
  readBy: null,
};

const keyOf = (projectId: string) => `cagewright.reading.${projectId}`;

/** Reads the settings kept for a project; the defaults where there are none or they cannot be read. */
export function readSettings(projectId: string): ReadingSettings {
  try {
    const kept: unknown = JSON.parse(window.localStorage.getItem(keyOf(projectId)) ?? 'null');
    return kept && typeof kept === 'object' ? { ...noSettings, ...kept } : noSettings;
  } catch {
    return noSettings;
  }
}

/** Keeps the settings. Where the device keeps nothing they hold until the page is left. */
export function keepSettings(projectId: string, settings: ReadingSettings): void {
  try {
    window.localStorage.setItem(keyOf(projectId), JSON.stringify(settings));
  } catch {
    // A full or private store: the screen itself still remembers.
  }
}
