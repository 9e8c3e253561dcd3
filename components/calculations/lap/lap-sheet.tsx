'use client';

import { CalculationSheet } from '../calculation-sheet';
import type { OpenedLink } from '../link';
import { lapCalculation } from './lap-calculation';
import { LapDrawing } from './lap-drawing';

/** The sheet of the lap length. */
export function LapSheet({ opened }: { opened: OpenedLink }) {
  return (
    <CalculationSheet
      slug="lap"
      calculation={lapCalculation}
      opened={opened}
      draw={(scene) => <LapDrawing scene={scene} />}
    />
  );
}
