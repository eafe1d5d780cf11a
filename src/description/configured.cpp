#include "carlin/description/model.hpp"
