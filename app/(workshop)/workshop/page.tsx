import { redirect } from 'next/navigation';

/** The area opens on its people. */
export default function WorkshopAreaPage() {
  redirect('/people');
}
