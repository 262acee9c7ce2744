/** Time–temperature superposition (Williams, Landel &amp; Ferry 1955; Ferry 1980, chapter 11). */
package nightlag.stages.superposition;
