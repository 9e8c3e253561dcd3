import { expect, test } from 'vitest';
import { fieldPaths, readRoute } from '@/components/field/field-routes';

const pourId = 'b0a3a7a4-0000-7000-8000-000000000001';

test('a path that a screen links to is read as that screen', () => {
  expect(readRoute(fieldPaths.pour(pourId))).toEqual({ screen: 'pour', pourId, route: { part: 'sheet' } });
  expect(readRoute(fieldPaths.face(pourId, 'soffit:1'))).toMatchObject({
    route: { part: 'face', faceId: 'soffit:1' },
  });
  expect(readRoute(fieldPaths.face(pourId, 'soffit', 'soffit.A1'))).toMatchObject({
    route: { part: 'face', pointKey: 'soffit.A1' },
  });
  expect(readRoute(fieldPaths.checks(pourId, 'steel'))).toMatchObject({
    route: { part: 'checks', group: 'steel' },
  });
  const spot = { kind: 'point', id: 'spot:b0a3a7a4' } as const;
  expect(readRoute(fieldPaths.nonconformance(pourId, spot))).toMatchObject({
    route: { part: 'nonconformance', about: spot },
  });
  expect(readRoute(fieldPaths.nonconformanceShown(pourId, 'n1'))).toMatchObject({
    route: { part: 'nonconformance-shown', id: 'n1' },
  });
  expect(readRoute(fieldPaths.photos(pourId, spot))).toMatchObject({
    route: { part: 'photos', about: spot },
  });
  expect(readRoute(fieldPaths.notSent)).toEqual({ screen: 'not-sent' });
  expect(readRoute('/field')).toEqual({ screen: 'pours' });
});

test('a path that nothing links to is said to be unknown and breaks nothing', () => {
  for (const path of [
    '/field/pours/x/nowhere',
    '/field/%E0%A4%A',
    '/pours',
    '/field/else',
    '/field/pours/x/entries',
  ])
    expect(readRoute(path)).toEqual({ screen: 'unknown' });
});
