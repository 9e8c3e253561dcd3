'use client';

import { CalculationSheet } from '../calculation-sheet';
import type { OpenedLink } from '../link';
import { evaporationCalculation } from './evaporation-calculation';
import { EvaporationDrawing } from './evaporation-drawing';

/** The sheet of the evaporation rate. */
export function EvaporationSheet({ opened }: { opened: OpenedLink }) {
  return (
    <CalculationSheet
      slug="evaporation"
      calculation={evaporationCalculation}
      opened={opened}
      draw={(scene) => <EvaporationDrawing scene={scene} />}
    />
  );
}
