import { redirect } from 'next/navigation';

/** The area's first page is its bins. */
export default function StoresPage() {
  redirect('/bins');
}
