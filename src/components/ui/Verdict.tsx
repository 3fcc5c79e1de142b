import type { Verdict as VerdictWord } from "~/domain/screening-result";

interface Props {
  /** Null where nothing has been screened yet. */
  verdict: VerdictWord | null;
  /** Says more than the bare word, such as "over, from the 7 sources drawn". */
  text?: string | undefined;
}

const shapes: Record<VerdictWord, React.ReactNode> = {
  within: <circle cx="6" cy="6" r="4.5" fill="none" stroke="currentColor" strokeWidth="1.75" />,
  undecided: (
    <>
      <path d="M6 1 L11 6 L6 11 L1 6 Z" fill="none" stroke="currentColor" strokeWidth="1.5" />
      <path d="M6 1 L1 6 L6 11 Z" fill="currentColor" />
    </>
  ),
  over: <path d="M6 0.75 L11.5 11 L0.5 11 Z" fill="currentColor" />,
};

/** A verdict as word and shape: open circle, half diamond, full triangle. */
export function Verdict({ verdict, text }: Props) {
  return (
    <span className={`verdict verdict-${verdict ?? "none"}`}>
      <svg aria-hidden="true" width="12" height="12" viewBox="0 0 12 12">
        {verdict === null ? <path d="M1 6 H11" stroke="currentColor" strokeWidth="1.75" /> : shapes[verdict]}
      </svg>
      <span className="whitespace-normal">{text ?? verdict ?? "not screened yet"}</span>
    </span>
  );
}
