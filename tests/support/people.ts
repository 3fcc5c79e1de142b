import { demoPeople } from "../../scripts/seed/demo-people";

/** Whom the sign-in fake of a test run knows besides the demo's people: another organisation's, and a stranger. */
const others = ["planner", "auditor", "installer", "admin"].map((role) => ({
  subject: `farnwick.${role}`,
  name: `Farnwick ${role}`,
  email: `${role}@farnwick.example`,
  remark: `Farnwick Signals, ${role}`,
}));

const stranger = {
  subject: "no.member",
  name: "No Member",
  email: "no.member@nowhere.example",
  remark: "Belongs to no organisation",
};

export const testPeople = [...demoPeople, ...others, stranger];
