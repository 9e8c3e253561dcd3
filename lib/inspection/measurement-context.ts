import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { MeasurementItem } from './measurement-item';
import type { Element, Layer, Mix, Plan, Requirement } from './plan';

/** What the limits of a measurement are computed from: the plan as far as it is issued, and the element measured. */
export interface MeasurementContext {
  basis: Plan['basis'];
  units: Plan['units'];
  mix: Mix | null;
  element: Element;
}

/** What issuing finds for one measurement. */
export type IssuedLimits = Pick<
  MeasurementItem,
  'kind' | 'quantity' | 'least' | 'most' | 'expected' | 'against' | 'trail'
>;

const noLimits = { least: null, most: null, expected: null } as const;

/** Limits with what is not said left open. */
export const limits = (
  found: Pick<IssuedLimits, 'kind' | 'quantity' | 'trail'> & Partial<IssuedLimits>,
): IssuedLimits => ({ ...noLimits, ...found });

/** A layer of the element. @throws ConcreteError where it is not there */
export function layerOf({ element }: MeasurementContext, layerId: string, field = 'layerId'): Layer {
  const layer = element.layers.find((one) => one.id === layerId);
  if (!layer) throw new ConcreteError(field, `Choose a layer of ${element.mark}.`, 'absent');
  return layer;
}

/** The spacing of a layer, mm. @throws ConcreteError where the plan gives a count instead */
export function spacingOf(layer: Layer, field = 'layerId'): number {
  if (layer.spacingMm === null)
    throw new ConcreteError(field, `Layer ${layer.name} has no spacing: enter it with the layer.`, 'absent');
  return layer.spacingMm;
}

/** The requirement to the outermost steel of a face. @throws ConcreteError where the face is not there */
export function outermostOf(
  { element }: MeasurementContext,
  faceId: string,
  field = 'faceId',
): { faceName: string; requirement: Requirement } {
  const face = element.faces.find((one) => one.id === faceId);
  const requirement = face?.requirements[0];
  if (!face || !requirement) throw new ConcreteError(field, `Choose a face of ${element.mark}.`, 'absent');
  return { faceName: face.name, requirement };
}

/** Runs a computation whose field names are its own, and names the form's field instead. */
export function atFields<T>(names: Readonly<Record<string, string>>, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (error instanceof ConcreteError)
      throw new ConcreteError(names[error.field] ?? error.field, error.reason, error.kind);
    throw error;
  }
}
