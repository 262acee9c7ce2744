/** From the bytes of a raw file to records in SI, one at a time; every row is used, left out or a reason to set the file aside. */
package nightlag.pipeline.decode;
