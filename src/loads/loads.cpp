#include "carlin/loads/loads.hpp"
