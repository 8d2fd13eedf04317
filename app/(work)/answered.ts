import { notFound, redirect } from "next/navigation";
import { AppError } from "@/lib/errors";

/**
 * Waits for what a page shows. A thing that does not exist (or is another workspace's) becomes the 404 page; a reader whose
 * session ended goes to sign in and comes back to `path`. Every other error goes on to the error page.
 */
export async function answered<T>(work: Promise<T>, path: string): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof AppError && error.code === "not found") notFound();
    if (error instanceof AppError && error.code === "signed out") {
      redirect(`/sign-in?next=${encodeURIComponent(path)}`);
    }
    throw error;
  }
}
