import type { AppContext } from '../context'
import { openDelivery } from '../mail/delivery'
import { runMailWorker } from '../mail/worker'
import { runDailyJobs } from './daily'

/** Starts what this server does besides answering; resolves once all of it has ended, after the server was asked to stop. */
export async function runWorkers(context: AppContext, address: string): Promise<void> {
  const origin = context.config.publicUrl ?? address
  await Promise.all([runMailWorker(context, openDelivery(context.config), origin), runDailyJobs(context)])
}
