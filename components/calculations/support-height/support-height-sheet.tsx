'use client';

import { CalculationSheet } from '../calculation-sheet';
import type { OpenedLink } from '../link';
import { supportHeightCalculation } from './support-height-calculation';
import { SupportHeightDrawing } from './support-height-drawing';

/** The sheet of the support height. */
export function SupportHeightSheet({ opened }: { opened: OpenedLink }) {
  return (
    <CalculationSheet
      slug="support-height"
      calculation={supportHeightCalculation}
      opened={opened}
      draw={(scene) => <SupportHeightDrawing scene={scene} />}
    />
  );
}
