import { useEffect, useState } from "react";
import { z } from "zod";
import { ApiRefusal, callApi } from "~/client/api";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { describedBy, FieldFrame } from "~/components/ui/Field";
import { draftChangedAnswer } from "~/domain/answers/notices";
import { coveringTextMaxLength } from "~/domain/notice";
import { AddresseeList } from "./AddresseeList";
import { DraftConflict } from "./DraftConflict";
import { conflictOf, type TheirDraft } from "./draft-conflict";
import { NoticePreview } from "./NoticePreview";
import { type Addressee, addresseesOf, chosenRecipients } from "./recipients";

interface Props {
  /** Address of the notice in the API. */
  api: string;
  /** Of the draft as the page was given it. */
  draftTag: string;
  coveringText: string;
  recipients: readonly { name: string; email: string }[];
  contacts: readonly { name: string; email: string; duty: string }[];
  /** Where the site's people to notify are kept. */
  siteUrl: string;
}

const anything = z.unknown();

/** Composes a draft: whom it goes to and what the planner writes above the positions; then preview and issue. */
export function NoticeComposer({ api, draftTag, coveringText, recipients, contacts, siteUrl }: Props) {
  const [base, setBase] = useState(draftTag);
  const [theirs, setTheirs] = useState<TheirDraft | null>(null);
  const [text, setText] = useState(coveringText);
  const [addressees, setAddressees] = useState<Addressee[]>(() => addresseesOf(contacts, recipients));
  const [faults, setFaults] = useState<ReadonlyMap<string, string>>(new Map());
  const [message, setMessage] = useState<{ text: string; bad: boolean } | null>(null);
  const [savedCount, setSavedCount] = useState(0);
  const [busy, setBusy] = useState(false);
  const [asking, setAsking] = useState(false);
  const [dirty, setDirty] = useState(false);
  const chosen = chosenRecipients(addressees);

  useEffect(() => {
    if (!dirty) return;
    const keep = (event: BeforeUnloadEvent) => event.preventDefault();
    addEventListener("beforeunload", keep);
    return () => removeEventListener("beforeunload", keep);
  }, [dirty]);

  function edited(): void {
    setDirty(true);
    setMessage(null);
  }

  async function attempt(work: () => Promise<void>): Promise<void> {
    setBusy(true);
    setMessage(null);
    setFaults(new Map());
    try {
      await work();
    } catch (error) {
      setAsking(false);
      const conflict = conflictOf(error);
      setTheirs(conflict);
      if (conflict !== null) return;
      if (error instanceof ApiRefusal)
        setFaults(new Map(error.faults.map((fault) => [fault.path, fault.message])));
      setMessage({ text: refusalText(error), bad: true });
    } finally {
      setBusy(false);
    }
  }

  const save = async (draftTag = base) => {
    const body = { draftTag, coveringText: text, recipients: chosen };
    const saved = await callApi(api, draftChangedAnswer, { method: "PATCH", body });
    setBase(saved.draftTag);
    setTheirs(null);
    setDirty(false);
    setSavedCount((count) => count + 1);
  };
  const saveDraft = (draftTag?: string) =>
    attempt(async () => {
      await save(draftTag);
      setMessage({ text: "The draft is saved.", bad: false });
    });
  const takeTheirs = (draft: TheirDraft) => {
    setBase(draft.draftTag);
    setText(draft.coveringText);
    setAddressees(addresseesOf(contacts, draft.recipients));
    setTheirs(null);
    setDirty(false);
  };
  const issue = async () => {
    await save();
    await callApi(`${api}/issue`, anything, { method: "POST", body: {} });
    location.reload();
  };

  return (
    <div className="grid gap-8">
      <AddresseeList
        addressees={addressees}
        faults={faults}
        siteUrl={siteUrl}
        onChange={(changed) => {
          setAddressees(changed);
          edited();
        }}
      />
      <FieldFrame
        id="coveringText"
        label="Covering text"
        hint={`Plain text above the positions, at most ${String(coveringTextMaxLength)} characters. May be left empty.`}
        error={faults.get("coveringText")}
      >
        <textarea
          id="coveringText"
          className="input"
          rows={7}
          maxLength={coveringTextMaxLength}
          value={text}
          onChange={(event) => {
            setText(event.target.value);
            edited();
          }}
          aria-describedby={describedBy("coveringText", true)}
        />
      </FieldFrame>
      <div role="status">
        {message !== null && (
          <p className={`message ${message.bad ? "message-over" : "message-within"}`}>{message.text}</p>
        )}
      </div>
      {theirs !== null && (
        <DraftConflict
          theirs={theirs}
          busy={busy}
          onKeepMine={() => void saveDraft(theirs.draftTag)}
          onTakeTheirs={() => takeTheirs(theirs)}
        />
      )}
      <div className="flex flex-wrap gap-3">
        <Button disabled={busy} onClick={() => void saveDraft()}>
          Save and preview
        </Button>
        <Button kind="primary" disabled={busy || chosen.length === 0} onClick={() => setAsking(true)}>
          Issue the notice…
        </Button>
        {chosen.length === 0 && (
          <p className="self-center text-sm text-muted">Choose at least one person to issue it.</p>
        )}
      </div>
      {savedCount > 0 && <NoticePreview api={api} key={savedCount} />}
      <Dialog open={asking} title="Issue this notice?" onClose={() => setAsking(false)}>
        <p>
          It is sent by e-mail to {chosen.length === 1 ? "1 person" : `${String(chosen.length)} people`} and
          stands as it is sent: an issued notice is not changed any more.
        </p>
        <ul className="mt-3 grid gap-1 text-sm">
          {chosen.map(({ name, email }) => (
            <li key={email} className="wrap-anywhere">
              {name} <span className="text-muted">{email}</span>
            </li>
          ))}
        </ul>
        <div className="mt-6 flex flex-wrap gap-3">
          <Button kind="primary" disabled={busy} onClick={() => void attempt(issue)}>
            Issue and send
          </Button>
          <Button disabled={busy} onClick={() => setAsking(false)}>
            Not yet
          </Button>
        </div>
      </Dialog>
    </div>
  );
}

function refusalText(error: unknown): string {
  if (error instanceof ApiRefusal) return error.message;
  return "There was no answer from the server. What you typed is still here; try again.";
}
