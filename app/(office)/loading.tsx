import { Spinner } from '@/components/ui/spinner';

/** While a page of the office is being read. */
export default function Loading() {
  return (
    <main id="main" className="mx-auto grid max-w-7xl px-4 py-10">
      <Spinner label="Reading the record" />
    </main>
  );
}
