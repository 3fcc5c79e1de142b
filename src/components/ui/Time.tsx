interface Props {
  at: Date | string;
  /** IANA name of the site's zone. */
  timeZone?: string | undefined;
  dateOnly?: boolean | undefined;
}

export function formatTime(at: Date | string, timeZone = "UTC", dateOnly = false): string {
  const options: Intl.DateTimeFormatOptions = dateOnly
    ? { day: "numeric", month: "long", year: "numeric" }
    : {
        day: "numeric",
        month: "short",
        year: "numeric",
        hour: "2-digit",
        minute: "2-digit",
        timeZoneName: "short",
      };
  return new Intl.DateTimeFormat("en-GB", { ...options, timeZone }).format(new Date(at));
}

/** A point in time as the site's clocks show it, with the zone's name. */
export function Time({ at, timeZone, dateOnly }: Props) {
  return <time dateTime={new Date(at).toISOString()}>{formatTime(at, timeZone, dateOnly)}</time>;
}
