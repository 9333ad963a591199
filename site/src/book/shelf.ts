// Whole jobs of the Book, read from the store.

import * as store from "../store";
import type { Filed } from "./file";

/** Some jobs with their spots. */
export function withSpots(jobs: store.Job[]): Promise<Filed[]> {
  return Promise.all(jobs.map(async (job) => ({ job, spots: await store.spots(job.id) })));
}

/** All jobs, with what the browser could not keep in the place of what it has.
 * What cannot be read is left out. */
export async function everything(unkept: store.NewSpot[], job: store.Job | undefined): Promise<Filed[]> {
  const filed = await store.jobs().then(withSpots).catch(() => [] as Filed[]);
  for (const spot of unkept) {
    const home = filed.find(({ spots }) => spots.some(({ id }) => id === spot.id)) ?? filed.find((f) => f.job.id === spot.job);
    if (home) home.spots = [...home.spots.filter(({ id }) => id !== spot.id), { ...spot, job: home.job.id }];
    else filed.push({ job: { id: spot.job, name: job?.name ?? "", created: spot.changed, ...(job?.id === spot.job ? job : {}) }, spots: [spot] });
  }
  return filed;
}
