#include "carlin/lattice/mesh.hpp"
