import { Counter, Gauge, Histogram, Registry, collectDefaultMetrics } from 'prom-client'

/** Prometheus metrics of this process. */
export function makeMetrics() {
  const registry = new Registry()
  collectDefaultMetrics({ register: registry, prefix: 'marram_' })
  return {
    registry,
    requests: new Histogram({
      name: 'marram_http_request_seconds',
      help: 'Time to answer, by route and status.',
      labelNames: ['route', 'status'],
      buckets: [0.005, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 1, 2.5],
      registers: [registry],
    }),
    holds: new Counter({
      name: 'marram_holds_total',
      help: 'Places asked for, by what came of it.',
      labelNames: ['outcome'],
      registers: [registry],
    }),
    handledEvents: new Counter({
      name: 'marram_events_total',
      help: 'Outbox events handled, by queue and outcome.',
      labelNames: ['queue', 'outcome'],
      registers: [registry],
    }),
    poolInUse: new Gauge({
      name: 'marram_database_connections_in_use',
      help: 'Connections of the pool that are busy.',
      registers: [registry],
    }),
  }
}

export type Metrics = ReturnType<typeof makeMetrics>
