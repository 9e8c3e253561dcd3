import { aciExposures } from '@/lib/concrete/cover-aci-318';
import { asExposures } from '@/lib/concrete/cover-as-3600';
import { csaExposures } from '@/lib/concrete/cover-csa-a23';
import { enExposures } from '@/lib/concrete/cover-en-1992';
import type { CoverBasis } from '@/lib/concrete/cover-input';
import { isExposures } from '@/lib/concrete/cover-is-456';

export interface ExposureClass {
  /** What the plan keeps and `coverRequirement` takes. */
  value: string;
  /** Plain words for a choice on a form. */
  label: string;
}

/** EN 206:2013 and EN 1992-1-1 Table 4.1, in short. */
const EN_WORDS: Record<(typeof enExposures)[number], string> = {
  X0: 'no risk of corrosion',
  XC1: 'dry or permanently wet',
  XC2: 'wet, rarely dry',
  XC3: 'moderate humidity',
  XC4: 'cyclic wet and dry',
  XD1: 'chlorides, moderate humidity',
  XD2: 'chlorides, wet, rarely dry',
  XD3: 'chlorides, cyclic wet and dry',
  XS1: 'airborne sea salt',
  XS2: 'sea water, permanently submerged',
  XS3: 'sea water, tidal, splash, spray',
};

const ACI_WORDS: Record<(typeof aciExposures)[number], string> = {
  'weather-or-ground': 'exposed to weather or in contact with ground',
  'not-exposed': 'not exposed to weather or in contact with ground',
  corrosive: 'corrosive (sea water, de-icing salts): as weather, with the commentary’s suggestion',
};

/** The exposures that a basis knows, in the order of its table; none where the contract alone governs. */
export function exposureClasses(basis: CoverBasis): readonly ExposureClass[] {
  const plain = (values: readonly string[]) => values.map((value) => ({ value, label: value }));
  switch (basis) {
    case 'aci-318-19':
      return aciExposures.map((value) => ({ value, label: ACI_WORDS[value] }));
    case 'en-1992':
      return enExposures.map((value) => ({ value, label: `${value}: ${EN_WORDS[value]}` }));
    case 'is-456':
      return plain(isExposures);
    case 'as-3600':
      return plain(asExposures);
    case 'csa-a23.1':
      return plain(csaExposures);
    case 'contract':
      return [];
  }
}
