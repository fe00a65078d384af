import { AnswerPage } from "@/app/_components/answer/answer-page";
import { PageHeader } from "@/app/_components/page-header";
import { Refusal } from "@/lib/engagement/refusal";
import { readAnswerPage } from "@/lib/services/answer-by-link";

export const metadata = { title: "Answer a notice", referrer: "no-referrer" as const };

/** Public: the signed link is the key. Opening it answers nothing. */
export default async function AnswerByLinkPage({ params }: { readonly params: Promise<{ token: string }> }) {
  const token = decodeURIComponent((await params).token);
  const body = await readAnswerPage(token, Date.now()).catch((error: unknown) => {
    if (error instanceof Refusal && error.status === 404) return null;
    throw error;
  });
  if (body === null) {
    return (
      <PageHeader title="This link is not known">
        It may have been cut short by the mail program. Open it again from the notice, or call the station's
        desk.
      </PageHeader>
    );
  }
  return <AnswerPage token={token} initial={body} />;
}
