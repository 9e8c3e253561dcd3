import type { ElementDraft } from './plan-draft';

const something = (text: string) => text.trim() || '-';

/** An element as typed, with what only names a thing filled in: names that are still empty do not stand in the way. */
export function previewElement(element: ElementDraft): ElementDraft {
  return {
    ...element,
    mark: something(element.mark),
    location: something(element.location),
    drawing: { number: something(element.drawing.number), revision: something(element.drawing.revision) },
    layers: element.layers.map((layer) => ({
      ...layer,
      name: something(layer.name),
      direction: something(layer.direction),
    })),
    faces: element.faces.map((face) => ({
      ...face,
      name: something(face.name),
      requirements: face.requirements.map((one) => ({ ...one, steel: something(one.steel) })),
      chosenPoints: face.chosenPoints.filter((one) => one.reason && one.x && one.y),
      openings: face.openings.filter((one) => one.name && one.width && one.height),
      recesses: face.recesses.filter((one) => one.name && one.width && one.height),
    })),
  };
}
