import { PageLoading } from "@/app/_components/ui/page-loading";

export default function Loading() {
  return <PageLoading title="Home" />;
}
