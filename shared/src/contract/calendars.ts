import * as z from 'zod';

/** The secret of a calendar link, as it stands in the path before `.ics`. */
export const calendarParams = z.object({ token: z.string().min(16).max(200) });

/** `GET/POST /api/me/calendar-feed`: the address to subscribe to; whoever holds it may read the events. */
export const calendarFeed = z.object({ url: z.string() });
export type CalendarFeed = z.infer<typeof calendarFeed>;
