'use client';

import { CoverSection } from '@/components/drawings/cover-section';
import { formatLength } from '@/lib/concrete/length';
import { CalculationSheet } from '../calculation-sheet';
import type { OpenedLink } from '../link';
import { lowCoverCalculation } from './low-cover-calculation';

/** The sheet of what low cover costs. */
export function LowCoverSheet({ opened }: { opened: OpenedLink }) {
  return (
    <CalculationSheet
      slug="low-cover"
      calculation={lowCoverCalculation}
      opened={opened}
      draw={({ units, specifiedMm, measuredMm, diameterMm }) => (
        <CoverSection
          name="Face"
          unit={units}
          specifiedMm={specifiedMm}
          leastAcceptedMm={specifiedMm}
          meeting="formed"
          barDiameterMm={diameterMm}
          format={(mm) => formatLength(mm, units, specifiedMm)}
          readings={[
            { label: 'as specified', mm: specifiedMm, mark: 'unread' },
            {
              label: 'measured',
              mm: measuredMm,
              mark: measuredMm < specifiedMm - 1e-6 ? 'not-met-low' : 'met',
            },
          ]}
        />
      )}
    />
  );
}
