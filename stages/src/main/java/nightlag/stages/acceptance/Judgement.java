package nightlag.stages.acceptance;

import java.util.OptionalDouble;

/**
 * A lot against one limit of its grade.
 *
 * @param limit the limit
 * @param value the lot's value in the limit's unit, K for a temperature; empty where there is none
 * @param u its standard uncertainty, what many records share included; empty where none can be had
 * @param verdict the verdict
 * @param note how the value was had, and what else a person should know; may be empty text
 */
public record Judgement(LimitPlan limit, OptionalDouble value, OptionalDouble u, Verdict verdict, String note) {}
