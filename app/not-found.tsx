import { ButtonLink } from "./_components/button";
import { EmptyState } from "./_components/empty-state";

export const metadata = { title: "Not here" };

export default function NotFound() {
  return (
    <>
      <h1 className="mb-4 text-2xl font-bold">Nothing at this address</h1>
      <EmptyState
        title="The page does not exist, or you may not know of it."
        action={<ButtonLink href="/">To the start</ButtonLink>}
      >
        A pass that a newer element set no longer shows is kept only where an engagement holds it.
      </EmptyState>
    </>
  );
}
