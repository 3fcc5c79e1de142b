import * as z from "zod";

/** What a clamp meter around the loop should read: net DC, and net rms per source and frequency. */
export const clampMeterAnswer = z.object({
  dcA: z.number(),
  alternating: z.array(z.object({ source: z.string(), frequencyHz: z.number(), rmsA: z.number() })),
});
