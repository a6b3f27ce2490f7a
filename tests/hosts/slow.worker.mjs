/** Stands in for the planner's worker: keeps its thread busy for as long as the job's title says. */
export default function run(job) {
  const until_ms = Date.now() + Number(job.document.title)
  while (Date.now() < until_ms);
  if (job.document.author === 'throws') throw new Error('as asked')
  return { kind: job.kind, asked: job.options }
}
