#include "carlin/solution/hull_solver.hpp"
