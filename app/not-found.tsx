/** An address that leads nowhere, or to something of another workshop: both look the same on purpose. */
import Link from 'next/link';

export default function NotFound() {
  return (
    <main className="mx-auto max-w-xl px-4 py-16">
      <title>Not here · Ohmstead</title>
      <h1 className="text-title font-bold">Nothing lies here</h1>
      <p className="mt-2 text-soft">
        The address is wrong, what it named is gone, or it belongs to another workshop. Nothing was changed.
      </p>
      <p className="mt-6 flex flex-wrap gap-x-6 gap-y-2">
        <Link href="/" className="link">
          Today
        </Link>
        <Link href="/circuits" className="link">
          Circuits
        </Link>
        <Link href="/stores" className="link">
          Stores
        </Link>
      </p>
    </main>
  );
}
