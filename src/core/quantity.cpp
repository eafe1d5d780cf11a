#include "carlin/core/quantity.hpp"
