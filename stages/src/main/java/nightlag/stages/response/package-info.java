/** What the material will do under a stepwise programme of stress or strain (Boltzmann superposition). */
package nightlag.stages.response;
