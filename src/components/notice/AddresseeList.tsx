import { Button } from "~/components/ui/Button";
import { Field } from "~/components/ui/Field";
import { type Addressee, chosenRecipients } from "./recipients";

interface Props {
  addressees: readonly Addressee[];
  /** By path, such as `recipients[0].email`; the number counts those chosen. */
  faults: ReadonlyMap<string, string>;
  siteUrl: string;
  onChange: (addressees: Addressee[]) => void;
}

export function AddresseeList({ addressees, faults, siteUrl, onChange }: Props) {
  const change = (index: number, part: Partial<Addressee>) =>
    onChange(addressees.map((addressee, at) => (at === index ? { ...addressee, ...part } : addressee)));
  const faultOf = (index: number, field: "name" | "email") =>
    faults.get(`recipients[${String(chosenRecipients(addressees.slice(0, index)).length)}].${field}`);

  return (
    <fieldset className="min-w-0">
      <legend className="mb-2 font-semibold">Who gets it</legend>
      {!addressees.some(({ duty }) => duty !== null) && (
        <p className="mb-3 text-sm text-muted">
          The site has nobody to notify yet. <a href={siteUrl}>Add its people</a> there, or name somebody here
          for this notice alone.
        </p>
      )}
      <ul className="grid gap-2">
        {addressees.map((addressee, index) =>
          addressee.duty === null ? (
            <li
              key={index}
              className="grid items-start gap-3 border-t border-rule pt-3 sm:grid-cols-[1fr_1fr_auto]"
            >
              <Field
                id={`recipient-${String(index)}-name`}
                label="Name"
                value={addressee.name}
                error={faultOf(index, "name")}
                onChange={(event) => change(index, { name: event.target.value })}
              />
              <Field
                id={`recipient-${String(index)}-email`}
                label="E-mail"
                type="email"
                value={addressee.email}
                error={faultOf(index, "email")}
                onChange={(event) => change(index, { email: event.target.value })}
              />
              <Button
                kind="quiet"
                className="sm:mt-7"
                aria-label={`Remove ${addressee.name === "" ? "this line" : addressee.name}`}
                onClick={() => onChange(addressees.filter((_, at) => at !== index))}
              >
                Remove
              </Button>
            </li>
          ) : (
            <li key={addressee.email}>
              <label className="flex min-h-11 items-center gap-3">
                <input
                  type="checkbox"
                  className="checkbox"
                  checked={addressee.chosen}
                  onChange={(event) => change(index, { chosen: event.target.checked })}
                />
                <span className="min-w-0">
                  <span className="wrap-anywhere">{addressee.name}</span>
                  <span className="block text-sm text-muted wrap-anywhere">
                    {addressee.duty}, {addressee.email}
                  </span>
                </span>
              </label>
            </li>
          ),
        )}
      </ul>
      <Button
        kind="quiet"
        className="mt-2"
        onClick={() => onChange([...addressees, { name: "", email: "", duty: null, chosen: true }])}
      >
        Add somebody else
      </Button>
    </fieldset>
  );
}
