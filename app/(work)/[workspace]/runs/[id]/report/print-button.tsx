"use client";

import { Button } from "@/app/_components/ui/button";

/** Opens the browser's own printing, from where the report goes to paper or to a PDF file. */
export function PrintButton() {
  return <Button onClick={() => window.print()}>Print or save as PDF</Button>;
}
