import { LoadingState } from "@/app/_components/ui/states";

export default function Loading() {
  return (
    <div className="px-4 md:px-6">
      <LoadingState />
    </div>
  );
}
