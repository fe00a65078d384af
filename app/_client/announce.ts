/** A short message for the person at the screen. */
export interface Announcement {
  readonly id: number;
  readonly message: string;
  /** A problem stays until it is closed; news goes by itself. */
  readonly kind: "news" | "problem";
  /** Where one may go on from here, or take it back. */
  readonly link?: AnnouncementLink | undefined;
}

export interface AnnouncementLink {
  readonly href: string;
  readonly label: string;
}

type Listener = (announcement: Announcement) => void;

const listeners = new Set<Listener>();
let lastId = 0;

/** Shows a message in the toast region and reads it to screen readers: `announce("Engagement E-1042 proposed.")`. */
export function announce(
  message: string,
  kind: Announcement["kind"] = "news",
  link?: AnnouncementLink,
): void {
  lastId += 1;
  for (const listener of listeners) listener({ id: lastId, message, kind, link });
}

/** For the toast region alone; returns how to stop listening. */
export function onAnnouncement(listener: Listener): () => void {
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
  };
}
