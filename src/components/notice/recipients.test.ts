import { describe, expect, it } from "vitest";
import { addresseesOf, chosenRecipients } from "./recipients";

const contacts = [
  { name: "Ilse Brandt", email: "ilse@quillhaven.example", duty: "Site lead" },
  { name: "Tom Okafor", email: "tom@quillhaven.example", duty: "Installer" },
];

describe("addressees of a notice", () => {
  it("starts with everybody of the site", () => {
    expect(chosenRecipients(addresseesOf(contacts, []))).toHaveLength(2);
  });

  it("keeps a draft's choice, whatever case an address was typed in, and people who are no contacts", () => {
    const draft = [
      { name: "Tom Okafor", email: "Tom@Quillhaven.example" },
      { name: "Rae", email: "rae@works.example" },
    ];
    const addressees = addresseesOf(contacts, draft);
    expect(addressees.map(({ name, chosen }) => [name, chosen])).toEqual([
      ["Ilse Brandt", false],
      ["Tom Okafor", true],
      ["Rae", true],
    ]);
  });

  it("leaves lines out that nobody filled in", () => {
    const addressees = [{ name: " ", email: "", duty: null, chosen: true }];
    expect(chosenRecipients(addressees)).toEqual([]);
  });
});
