#include "carlin/output/output.hpp"
