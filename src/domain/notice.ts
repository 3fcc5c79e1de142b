/** What a notice tells; clearance and withdrawal join when revisions are released. */
export const noticeKinds = ["screening"] as const;
export type NoticeKind = (typeof noticeKinds)[number];

/** A draft may still be edited and previewed; an issued notice stands as it was sent. */
export const noticeStates = ["draft", "issued"] as const;
export type NoticeState = (typeof noticeStates)[number];

/** Stands on every notice as long as no revision is released from its plan. */
export const preliminaryMark = "PRELIMINARY, NOT FOR MOUNTING";

export const coveringTextMaxLength = 4000;
