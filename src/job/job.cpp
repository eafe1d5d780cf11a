#include "carlin/job/job.hpp"
