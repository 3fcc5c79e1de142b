/** Skipped tests that do not count as failed: the test's full name, and why it may be skipped. */
export const allowedSkips: Readonly<Record<string, string>> = {};
