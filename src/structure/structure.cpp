#include "carlin/structure/structure.hpp"
