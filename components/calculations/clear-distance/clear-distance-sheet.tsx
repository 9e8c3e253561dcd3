'use client';

import { CalculationSheet } from '../calculation-sheet';
import type { OpenedLink } from '../link';
import { clearDistanceCalculation } from './clear-distance-calculation';
import { ClearDistanceDrawing } from './clear-distance-drawing';

/** The sheet of the clear distance between bars. */
export function ClearDistanceSheet({ opened }: { opened: OpenedLink }) {
  return (
    <CalculationSheet
      slug="clear-distance"
      calculation={clearDistanceCalculation}
      opened={opened}
      draw={(scene) => <ClearDistanceDrawing scene={scene} />}
    />
  );
}
