'use client';

import { CoverSection } from '@/components/drawings/cover-section';
import { formatLength } from '@/lib/concrete/length';
import { CalculationSheet } from '../calculation-sheet';
import type { OpenedLink } from '../link';
import { coverCalculation } from './cover-calculation';

/** The sheet of the required cover. */
export function CoverSheet({ opened }: { opened: OpenedLink }) {
  return (
    <CalculationSheet
      slug="cover"
      calculation={coverCalculation}
      opened={opened}
      draw={({ units, ...scene }) => (
        <CoverSection
          name="Face"
          unit={units}
          {...scene}
          format={(mm) => formatLength(mm, units, scene.leastAcceptedMm)}
          readings={[{ label: 'as specified', mm: scene.specifiedMm, mark: 'unread' }]}
        />
      )}
    />
  );
}
