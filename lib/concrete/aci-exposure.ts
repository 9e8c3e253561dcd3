import { ConcreteError } from '@/lib/concrete/concrete-error';

/** What an exposure class of ACI 318-19 asks of the concrete. */
export interface AciConcrete {
  leastStrengthPsi: number;
  /** Most water to cementitious material by mass; null where the class sets none. */
  mostWaterCement: number | null;
}

/** ACI 318-19 Tables 19.3.1.1 and 19.3.2.1: from memory, check against the edition in force. */
const CLASSES: Readonly<Record<string, AciConcrete>> = {
  F0: { leastStrengthPsi: 2500, mostWaterCement: null },
  F1: { leastStrengthPsi: 3500, mostWaterCement: 0.55 },
  F2: { leastStrengthPsi: 4500, mostWaterCement: 0.45 },
  F3: { leastStrengthPsi: 5000, mostWaterCement: 0.4 },
  S0: { leastStrengthPsi: 2500, mostWaterCement: null },
  S1: { leastStrengthPsi: 4000, mostWaterCement: 0.5 },
  S2: { leastStrengthPsi: 4500, mostWaterCement: 0.45 },
  'S3 option 1': { leastStrengthPsi: 4500, mostWaterCement: 0.45 },
  'S3 option 2': { leastStrengthPsi: 5000, mostWaterCement: 0.4 },
  W0: { leastStrengthPsi: 2500, mostWaterCement: null },
  W1: { leastStrengthPsi: 2500, mostWaterCement: null },
  W2: { leastStrengthPsi: 4000, mostWaterCement: 0.5 },
  C0: { leastStrengthPsi: 2500, mostWaterCement: null },
  C1: { leastStrengthPsi: 2500, mostWaterCement: null },
  C2: { leastStrengthPsi: 5000, mostWaterCement: 0.4 },
};

/** Names of the classes known here. */
export const aciConcreteClasses: readonly string[] = Object.keys(CLASSES);

/**
 * The concrete that several exposure classes ask for together: the greatest strength and the least water (ACI 318-19
 * 19.3.2.1, from memory). Refuses an unknown class and an empty list.
 */
export function governingConcrete(classes: readonly string[]): AciConcrete {
  if (classes.length === 0) throw new ConcreteError('classes', 'Choose the exposure classes.', 'absent');
  const asked = classes.map((name) => {
    const found = CLASSES[name];
    if (!found) throw new ConcreteError('classes', `"${name}" is no exposure class of ACI 318-19.`);
    return found;
  });
  const waters = asked.map((concrete) => concrete.mostWaterCement).filter((ratio) => ratio !== null);
  return {
    leastStrengthPsi: Math.max(...asked.map((concrete) => concrete.leastStrengthPsi)),
    mostWaterCement: waters.length > 0 ? Math.min(...waters) : null,
  };
}
