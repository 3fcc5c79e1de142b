import { customType, datetime, varchar } from "drizzle-orm/mysql-core";

/** A UUID made by the application: MariaDB does not hand back ids that it made itself. */
export const id = customType<{ data: string }>({
  dataType: () => "char(36) character set ascii collate ascii_bin",
});

/** A SHA-256 in lower-case hexadecimal. */
export const sha256Hex = customType<{ data: string }>({
  dataType: () => "char(64) character set ascii collate ascii_bin",
});

/** A string that is compared byte by byte: keys, states, codes. */
export const code = customType<{ data: string; config: { length: number } }>({
  dataType: (config) => `varchar(${String(config?.length ?? 64)}) character set ascii collate ascii_bin`,
});

/** An id inside a plan document: the planner's own characters, up to 100 of them, compared byte by byte. */
export const documentKey = customType<{ data: string }>({
  dataType: () => "varchar(100) character set utf8mb4 collate utf8mb4_bin",
});

/** Text that is kept to the byte, such as a plan document's JSON (up to the packet size, 64 MB). */
export const exactText = customType<{ data: string }>({
  dataType: () => "longtext character set utf8mb4 collate utf8mb4_bin",
});

/** An instant in UTC, to the millisecond. */
export const instant = (name: string) => datetime(name, { mode: "date", fsp: 3 });

/** A name that people read and sort by. */
export const label = (name: string, length = 200) => varchar(name, { length });
