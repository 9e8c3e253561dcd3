import { holds } from '@/lib/inspection/holds';
import { pourState } from '@/lib/inspection/pour-state';
import { foldSheet, newFoldMemo } from '@/lib/inspection/sheet';

/**
 * What folds and judges a pour. It is the largest part of the program on a phone and the list of pours needs none of
 * it, so it is loaded when the first pour is opened.
 */
export const sheetEngine = { foldSheet, holds, newFoldMemo, pourState } as const;

export type SheetEngine = typeof sheetEngine;
