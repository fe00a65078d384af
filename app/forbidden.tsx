import { ButtonLink } from "./_components/button";
import { EmptyState } from "./_components/empty-state";

export const metadata = { title: "Not allowed" };

export default function Forbidden() {
  return (
    <>
      <h1 className="mb-4 text-2xl font-bold">Your role does not open this page</h1>
      <EmptyState
        title="You are signed in, but this page belongs to other work."
        action={<ButtonLink href="/">To your pages</ButtonLink>}
      >
        An administrator can change roles under People.
      </EmptyState>
    </>
  );
}
