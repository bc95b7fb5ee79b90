// Package hand answers a case a second and a third way, so that a person can
// believe the first.
//
// The hand method is what an operator can do with a pocket calculator: constants
// from three-term equations, one activity coefficient, carbonate alkalinity and
// nothing else, shares of the inorganic carbon, carbon from the raw pH, dose from
// the target pH. Where it parts from the model it says which of its assumptions
// does not hold here. The method is that of any textbook of aquatic chemistry
// (Stumm & Morgan, Aquatic Chemistry, ch. 4: from memory).
//
// The forward titration adds the chemical step by step, finds the pH of each
// step by plain halving, and stops where the target is met.
//
//	constants                       constants.go
//	a water at one pH               point.go
//	the method                      method.go
//	the ladder from model to hand   ladder.go
//	its bound                       bound.go
//	the verdict                     answer.go
//	the titration                   titration.go
package hand
