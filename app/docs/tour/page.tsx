import type { Metadata } from "next";
import { PlainLines } from "@/app/_components/editor/plain-lines";
import { Tour } from "./tour";
import { TOUR_TEXT } from "./tour-text";

export const metadata: Metadata = { title: "First tour" };

export default function TourPage() {
  return (
    <>
      {/* What has the focus must not lie under the bar that stays in view. */}
      <style>{"html { scroll-padding-bottom: 112px }"}</style>
      <h1 className="text-2xl tracking-tight md:text-3xl">First tour</h1>
      <p className="mt-3 max-w-2xl text-lg text-quiet">
        Five minutes and seven steps, each done by you on the sheet below. The page sees when a step is done;
        it can also do it for you, as a change that you can undo.
      </p>
      <p className="mt-2 max-w-2xl text-quiet text-sm">
        The circuit and its figures are invented. How far you are stays in this browser.
      </p>
      <Tour text={TOUR_TEXT}>
        <PlainLines text={TOUR_TEXT} label="Netlist text" />
      </Tour>
    </>
  );
}
