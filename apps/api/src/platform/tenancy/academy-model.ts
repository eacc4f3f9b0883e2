import type { Knex } from 'knex'
import { Model, QueryBuilder, type Page, type QueryContext } from 'objection'
import { invariant } from '../invariant'
import { academyOf } from './transaction'

interface Statement {
  grouping: string
}

/** The parts of a built Knex query that the wall works on. Internals: Objection is pinned. */
interface BuiltQuery extends Knex.QueryBuilder {
  _statements: Statement[]
}

interface WithInternals {
  executeOnBuildKnex(built: Knex.QueryBuilder): BuiltQuery
  isPartial(): boolean
  knex(): Knex
}

/**
 * Adds `academy_id = …` to every select, update and delete, of graphs, relations and sub-queries
 * too, and refuses to run outside an academy. What was there before goes into one group behind it,
 * so that a top-level `or` cannot reach around.
 */
export class AcademyQueryBuilder<M extends Model, R = M[]> extends QueryBuilder<M, R> {
  declare ArrayQueryBuilderType: AcademyQueryBuilder<M>
  declare SingleQueryBuilderType: AcademyQueryBuilder<M, M>
  declare MaybeSingleQueryBuilderType: AcademyQueryBuilder<M, M | undefined>
  declare NumberQueryBuilderType: AcademyQueryBuilder<M, number>
  declare PageQueryBuilderType: AcademyQueryBuilder<M, Page<M>>

  executeOnBuildKnex(built: Knex.QueryBuilder): Knex.QueryBuilder {
    const internals = QueryBuilder.prototype as unknown as WithInternals
    const query = internals.executeOnBuildKnex.call(this, built)
    const self = this as unknown as WithInternals
    if (self.isPartial() || this.isInsert()) return query

    const academyId = academyOf(self.knex())
    const asked = query._statements.filter(({ grouping }) => grouping === 'where')
    query._statements = query._statements.filter(({ grouping }) => grouping !== 'where')
    query.where(`${this.tableRefOf()}.academy_id`, academyId)
    if (asked.length > 0) {
      query.where((group) => {
        // The group is a Knex builder too; its statements are the ones taken off above.
        ;(group as BuiltQuery)._statements.push(...asked)
      })
    }
    return query
  }

  /** Joins go through the scoped sub-query instead of the bare table. */
  isSelectAll(): boolean {
    return false
  }

  private tableRefOf(): string {
    return (this as unknown as { tableRef(): string }).tableRef()
  }
}

/** A row of one academy. Its `academyId` is filled in from the transaction and never from input. */
export class AcademyModel extends Model {
  academyId!: string

  declare QueryBuilderType: AcademyQueryBuilder<this, this[]>
  static override QueryBuilder = AcademyQueryBuilder

  override $beforeInsert(context: QueryContext): void {
    this.stamp(context)
  }

  override $beforeUpdate(_options: unknown, context: QueryContext): void {
    if (this.givenAcademyIds().length > 0) this.stamp(context)
  }

  /**
   * What the row says of its academy, under the property's name and under the column's, which
   * would reach the database as well. A row that is yet to be written says nothing.
   */
  private givenAcademyIds(): unknown[] {
    const { academyId, academy_id: byColumn } = this as { academyId?: string; academy_id?: unknown }
    return [academyId, byColumn].filter((given) => given !== undefined)
  }

  private stamp(context: QueryContext): void {
    const academyId = academyOf(context.transaction)
    invariant(
      this.givenAcademyIds().every((given) => given === academyId),
      'a row of another academy was about to be written',
    )
    this.academyId = academyId
  }
}
