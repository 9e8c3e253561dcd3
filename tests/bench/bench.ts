import type { Browser } from '@playwright/test';
import type { Product } from './world/product';
import type { Row } from './row';

/** What every line of work is given. */
export interface Bench {
  product: Product;
  browser: Browser;
  /** How often each measurement is repeated; medians are printed. */
  rounds: number;
  /** Entries that each of the 5,000 pours of the long list holds: 1,000 makes five million. */
  scale: number;
}

/** One line of work, or several that are measured in turns. */
export type Line = (bench: Bench) => Promise<Row[]>;
