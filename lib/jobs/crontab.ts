/**
 * What happens by the clock (UTC), in the library's crontab form. It is scheduled once however many
 * workers run. A job key keeps a round that had to wait from piling up behind itself.
 */
export const CRONTAB = `
* * * * * lapse-engagements ?jobKey=lapse-engagements&max=3
7 * * * * keep-week-filled ?jobKey=keep-week-filled&max=3
23 4 * * * prune-workers ?jobKey=prune-workers&max=3
`;
