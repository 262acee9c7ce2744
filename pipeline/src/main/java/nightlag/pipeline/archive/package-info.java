/** Everything reduced so far, in one SQLite file: a file is committed whole, its lots marked due in the same commit. */
package nightlag.pipeline.archive;
