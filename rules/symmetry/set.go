package symmetry

// SetName names the parameter set of the π systems before and after, and of the levels
// that are followed with real h and k. The verdicts do not depend on it.
const SetName = summarySet
