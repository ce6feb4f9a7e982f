import { redirect } from 'next/navigation';

/** The area opens on what has to be bought. */
export default function PurchasingAreaPage() {
  redirect('/shortfalls');
}
