import { ApiRefusal, NoConnection, refusalOf } from "./api";

/**
 * Sends a `<form data-api="/api/…">` as JSON when it is submitted.
 * - `data-method`: POST unless said; `data-body`: JSON that the fields are added to.
 * - `data-then`: "reload" (the default), "url" for the address that the answer names, or a path.
 * - `data-confirm`: a question to be answered first.
 * Fields become the body's keys by name; `type=number` becomes a number, or null when empty; checkboxes of one name become
 * the list of those ticked; `data-omit-empty` leaves a field out when it is empty. Faults appear in the field's `[data-fault-for]`, the message in the form's `[data-message]`.
 */
document.addEventListener("submit", (event) => {
  const form = event.target;
  if (!(form instanceof HTMLFormElement) || form.dataset["api"] === undefined) return;
  event.preventDefault();
  const question = form.dataset["confirm"];
  if (question !== undefined && !window.confirm(question)) return;
  void submit(form, form.dataset["api"]);
});

async function submit(form: HTMLFormElement, path: string): Promise<void> {
  const buttons = [...form.querySelectorAll("button")].filter((button) => !button.disabled);
  clearFaults(form);
  for (const button of buttons) button.disabled = true;
  try {
    const answer = await send(path, form.dataset["method"] ?? "POST", bodyOf(form));
    go(form.dataset["then"] ?? "reload", answer);
  } catch (error) {
    for (const button of buttons) button.disabled = false;
    if (error instanceof ApiRefusal) showRefusal(form, error);
    else if (error instanceof NoConnection)
      showMessage(form, "There was no answer from the server. What you typed is still here; try again.");
    else throw error;
  }
}

async function send(path: string, method: string, body: Record<string, unknown>): Promise<unknown> {
  let response: Response;
  try {
    response = await fetch(path, {
      method,
      headers: { accept: "application/json", "content-type": "application/json" },
      ...(method !== "DELETE" && { body: JSON.stringify(body) }),
    });
  } catch (failed) {
    throw new NoConnection(failed);
  }
  const text = await response.text();
  if (!response.ok) throw refusalOf(response.status, text);
  return text === "" ? null : JSON.parse(text);
}

function bodyOf(form: HTMLFormElement): Record<string, unknown> {
  const body = JSON.parse(form.dataset["body"] ?? "{}") as Record<string, unknown>;
  for (const field of form.elements) {
    if (!(
      field instanceof HTMLInputElement ||
      field instanceof HTMLSelectElement ||
      field instanceof HTMLTextAreaElement
    ))
      continue;
    if (field.name === "" || field.disabled) continue;
    if (field.type === "checkbox") {
      const list = (body[field.name] ??= []) as string[];
      if ((field as HTMLInputElement).checked) list.push(field.value);
      continue;
    }
    const value = field.value.trim();
    if (value === "" && field.dataset["omitEmpty"] !== undefined) continue;
    body[field.name] = field.type === "number" ? numberOf(value) : value;
  }
  return body;
}

const numberOf = (text: string): number | null => (text === "" ? null : Number(text.replace(",", ".")));

function go(then: string, answer: unknown): void {
  if (then === "reload") location.reload();
  else if (then !== "url") location.assign(then);
  else if (typeof answer === "object" && answer !== null && "url" in answer)
    location.assign(String(answer.url));
  else location.reload();
}

function clearFaults(form: HTMLFormElement): void {
  for (const place of form.querySelectorAll("[data-fault-for], [data-message]")) place.textContent = "";
  for (const field of form.querySelectorAll("[aria-invalid=true]"))
    field.setAttribute("aria-invalid", "false");
}

function showRefusal(form: HTMLFormElement, refusal: ApiRefusal): void {
  const homeless: string[] = [];
  let first: HTMLElement | null = null;
  for (const { path, message } of refusal.faults) {
    const field = form.elements.namedItem(path);
    const place =
      field instanceof HTMLElement ? form.querySelector(`[data-fault-for="${CSS.escape(field.id)}"]`) : null;
    if (!(field instanceof HTMLElement) || place === null) {
      homeless.push(message);
      continue;
    }
    place.textContent = message;
    field.setAttribute("aria-invalid", "true");
    first ??= field;
  }
  const text =
    refusal.code === "sign-in.required"
      ? "You have been signed out. Sign in in another window, then try again here."
      : refusal.message;
  if (first === null || homeless.length > 0) showMessage(form, [text, ...homeless].join(" "));
  const { signInAgain } = refusal.detail;
  if (refusal.code === "sign-in.too-old" && typeof signInAgain === "string") offerSignIn(form, signInAgain);
  first?.focus();
}

/** In another window, so that nothing typed here is lost. */
function offerSignIn(form: HTMLFormElement, address: string): void {
  const link = document.createElement("a");
  link.href = address;
  link.target = "_blank";
  link.textContent = "Sign in again in another window";
  form.querySelector("[data-message]")?.append(" ", link, ".");
}

function showMessage(form: HTMLFormElement, text: string): void {
  const place = form.querySelector("[data-message]");
  if (place !== null) place.textContent = text;
}
