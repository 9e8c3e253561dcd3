import type { Metadata } from 'next';
import { connection } from 'next/server';
import { notFound } from 'next/navigation';

export const metadata: Metadata = { title: 'Not here' };

/**
 * Whatever no other page answers to. It is drawn for each request, so that the page that says so gets the nonce of its
 * own Content-Security-Policy; the one that Next.js makes ahead of time has none, and its scripts would not run.
 */
export default async function MissingPage() {
  await connection();
  notFound();
}
