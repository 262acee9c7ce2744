/** Verdicts against limits with a guard band (JCGM 106). */
package nightlag.stages.acceptance;
