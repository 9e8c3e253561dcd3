import { test } from '@playwright/test';
import { everything } from '../world/seeded';

/** A test that is shown as skipped until everything is asked for (`npm run test:faults -- --all`). */
export const thoroughTest = everything ? test : test.skip;
