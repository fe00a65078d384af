import { forbidden } from "next/navigation";
import { NoticeDesk } from "@/app/_components/notice/notice-desk";
import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { may } from "@/lib/engagement/roles";
import { listNotices } from "@/lib/services/list-notices";

export const metadata = { title: "Notices" };

export default async function NoticesPage() {
  const person = await requirePerson();
  if (!may(person, "see all notices") && !may(person, "see own notices")) forbidden();
  const { notices } = await listNotices(person, {});
  const mayAnswer = may(person, "answer notices");
  return (
    <>
      <PageHeader title="Notices">
        {mayAnswer
          ? "What your authority is asked, until when, and what it has answered."
          : "What was sent to which authority, whether it arrived, and what was answered."}
      </PageHeader>
      <NoticeDesk nowMs={Date.now()} initial={notices} mayAnswer={mayAnswer} />
    </>
  );
}
