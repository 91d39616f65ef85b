import { job } from '~/features/jobs/contract';
import { cancelJob, readJob } from '~/features/jobs/server';
import { route } from '~/server/route';

export const GET = route(
  { action: 'job.own', summary: 'One of my jobs: its state, progress and result', answer: job },
  ({ actor, params }) => readJob(actor, params['id']!),
);

export const DELETE = route(
  { action: 'job.own', summary: 'Cancel one of my jobs', answer: job },
  ({ actor, params }) => cancelJob(actor, params['id']!),
);
