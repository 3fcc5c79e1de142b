/** People of the demo's organisation, as its sign-in service knows them. They are invented. */
export const demoPeople: { subject: string; name: string; email: string; remark: string }[] = [
  {
    subject: "maren.oakshott",
    name: "Maren Oakshott",
    email: "maren.oakshott@quillhaven.example",
    remark: "Planner",
  },
  {
    subject: "tobias.fennimore",
    name: "Tobias Fennimore",
    email: "tobias.fennimore@quillhaven.example",
    remark: "Auditor",
  },
  {
    subject: "ilka.brandvold",
    name: "Ilka Brandvold",
    email: "ilka.brandvold@quillhaven.example",
    remark: "Installer",
  },
  {
    subject: "henrik.sallow",
    name: "Henrik Sallow",
    email: "henrik.sallow@quillhaven.example",
    remark: "Admin",
  },
  {
    subject: "ruta.vellamo",
    name: "Ruta Vellamo",
    email: "ruta.vellamo@quillhaven.example",
    remark: "Planner and auditor",
  },
];
