import { and, eq, getTableColumns } from "drizzle-orm";
import type { Queryable } from "../client";
import { notices } from "../schema/notices";
import { screenings } from "../schema/plans";

export async function findNotice(db: Queryable, organisationId: string, planId: string, noticeId: string) {
  const [row] = await db
    .select(getTableColumns(notices))
    .from(notices)
    .innerJoin(screenings, eq(screenings.id, notices.screeningId))
    .where(
      and(
        eq(notices.organisationId, organisationId),
        eq(screenings.planId, planId),
        eq(notices.id, noticeId),
      ),
    );
  return row;
}
