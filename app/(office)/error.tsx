'use client';

/** The frame of the office stays around a page that could not be drawn, so that one can go on elsewhere. */
export { default } from '../error';
