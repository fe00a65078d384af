import { redirect } from "next/navigation";
import { currentPerson } from "@/app/_server/require-person";
import { safeReturnPath } from "@/app/_server/return-path";
import { SignInForm } from "./sign-in-form";

export const metadata = { title: "Sign in" };

/** Why somebody lands here who was signed in a moment ago. */
const ENDED = {
  password: "Your password is changed. Sign in with the new one.",
  sessions: "All your sessions have ended.",
};

interface SignInPageProps {
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function SignInPage({ searchParams }: SignInPageProps) {
  const { next, callbackUrl, after } = await searchParams;
  const wanted = typeof next === "string" ? next : typeof callbackUrl === "string" ? callbackUrl : null;
  const returnTo = safeReturnPath(wanted);
  if (await currentPerson()) redirect(returnTo);
  return (
    <div className="mx-auto grid max-w-5xl gap-x-16 gap-y-8 pt-4 lg:grid-cols-[minmax(0,1fr)_24rem] lg:pt-16">
      <div>
        <h1 className="max-w-[18ch] text-4xl leading-[1.1] font-bold sm:text-5xl">Time is the material.</h1>
        <p className="mt-4 max-w-[46ch] text-[1.0625rem] text-quiet">
          Every pass is a strip of seconds. Rules cut closures out of it, the physics says what each open
          second is worth, the book holds the dwell, and people answer for it.
        </p>
        <PassSketch />
      </div>
      <div className="sheet self-start p-5 max-lg:order-first">
        <h2 className="mb-4 text-xl font-bold">Sign in</h2>
        {after === "password" || after === "sessions" ? <p className="mb-4">{ENDED[after]}</p> : null}
        <SignInForm returnTo={returnTo} />
      </div>
    </div>
  );
}

/** The sign of the book: an arch over its seconds, a closure cut out, the dwell under it. */
function PassSketch() {
  return (
    <svg viewBox="0 0 560 150" className="mt-8 w-full max-w-[35rem]" aria-hidden="true">
      <path
        d="M4 112 L4 84 C90 78 150 74 210 80 C250 85 272 104 288 112 Z"
        fill="var(--worth)"
        opacity="0.75"
      />
      <path d="M288 112 C330 122 470 124 556 119 L556 112 Z" fill="var(--harm)" opacity="0.7" />
      <path d="M4 112 C80 104 122 86 150 68" fill="none" stroke="var(--ink)" strokeWidth="2.2" />
      <path
        d="M190 44 C250 14 310 14 372 46 C420 72 470 102 556 112"
        fill="none"
        stroke="var(--ink)"
        strokeWidth="2.2"
      />
      {[154, 162, 170, 178].map((x) => (
        <path key={x} d={`M${x} 112 L${x + 12} 20`} stroke="var(--shut)" strokeWidth="2.4" />
      ))}
      <path d="M4 112H556" stroke="var(--ink)" />
      <rect x="194" y="119" width="84" height="11" rx="1" fill="var(--dwell)" />
      <path d="M194 115v22M278 115v22" stroke="var(--dwell)" strokeWidth="2" />
    </svg>
  );
}
