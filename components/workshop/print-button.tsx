'use client';
/** Prints the page. Client: the browser does it. */
import { Button } from '@/components/ui/button';

export function PrintButton({ word }: { readonly word: string }) {
  return <Button onClick={() => window.print()}>{word}</Button>;
}
