// Shaded shares of alike tables under many lights, in plain C++: what a native program does with sorted neighbours and
// exact rectangles. Usage: alike <scene.bin> <repeats>.
// The file holds doubles: tables, lights, half glass width and height, half steel width and height, degrees of a sector;
// then east, north, up of each table; then for each light its sector, its azimuth in degrees, the sine of its elevation
// and its projection U, V, n, sorted by sector and from the highest down.
// Prints one JSON object: processor milliseconds of one pass over all lights once the lists stand (median), those of
// making the lists, and the sum of all shares.
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <ctime>
#include <vector>

namespace {

struct Light {
	double sector, azimuthDeg, sine, axes[9];
};
static_assert(sizeof(Light) == 12 * sizeof(double), "as written by the bench");

struct Neighbour {
	double bound, dx, dy, dz;
};

struct Sizes {
	double w, h, sw, sh;
};

// Shaders must stand this far up-sun along the normal, metres.
const double UP_SUN_M = 1e-7;

double processorMs() {
	timespec now;
	clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &now);
	return now.tv_sec * 1e3 + now.tv_nsec / 1e6;
}

// Highest sine of a light that something at this offset can block, its height and the table's together within r.
double highestSine(double dx, double dy, double dz, double r, double aside) {
	const double level2 = dx * dx + dy * dy;
	const double along2 = dz < -r ? level2 : std::max(0.0, level2 - aside * aside);
	const double d = std::sqrt(along2 + dz * dz);
	if (d <= r) return 1;
	const double reach = r / d;
	const double cosReach = std::sqrt(1 - reach * reach);
	if (dz / d >= cosReach) return 1;
	return dz / d * cosReach + std::sqrt(along2) / d * reach + 1e-9;
}

// Union of rectangles that are no smaller than the table: each holds one of its corners, so those at the bottom, and
// those at the top, make staircases from both sides.
class Union {
public:
	std::vector<double> x, y;

	double area(const Sizes& s) {
		double low = -s.h, high = s.h;
		for (size_t k = 0; k < x.size(); k++) {
			if (y[k] <= 0) low = std::max(low, y[k] + s.sh);
			else high = std::min(high, y[k] - s.sh);
		}
		return low > high ? swept(s) : stairs(s, true) + stairs(s, false);
	}

private:
	std::vector<double> sortedX, away;

	double stairs(const Sizes& s, bool bottom) {
		sortedX.clear();
		away.clear();
		for (size_t k = 0; k < x.size(); k++) {
			if ((y[k] <= 0) != bottom) continue;
			const double distance = std::fabs(y[k]);
			size_t at = away.size();
			away.push_back(distance);
			sortedX.push_back(x[k]);
			for (; at > 0 && away[at - 1] > distance; at--) {
				away[at] = away[at - 1];
				sortedX[at] = sortedX[at - 1];
			}
			away[at] = distance;
			sortedX[at] = x[k];
		}
		double left = -s.w, right = s.w, sum = 0;
		for (size_t k = 0; k < away.size() && left < right; k++) {
			const double from = std::max(left, sortedX[k] - s.sw);
			const double to = std::min(right, sortedX[k] + s.sw);
			if (to <= from) continue;
			sum += (to - from) * std::min(2 * s.h, s.h + s.sh - away[k]);
			if (sortedX[k] <= 0) left = to;
			else right = from;
		}
		return sum;
	}

	// Bottom and top ones meet: strips between all sides.
	double swept(const Sizes& s) {
		std::vector<double> cuts{-s.w, s.w};
		for (double middle : x)
			for (double side : {middle - s.sw, middle + s.sw})
				if (side > -s.w && side < s.w) cuts.push_back(side);
		std::sort(cuts.begin(), cuts.end());
		double sum = 0;
		for (size_t c = 0; c + 1 < cuts.size(); c++) {
			double low = -s.h, high = s.h;
			for (size_t k = 0; k < x.size(); k++) {
				if (x[k] - s.sw > cuts[c] || x[k] + s.sw < cuts[c + 1]) continue;
				if (y[k] <= 0) low = std::max(low, y[k] + s.sh);
				else high = std::min(high, y[k] - s.sh);
			}
			sum += (cuts[c + 1] - cuts[c]) * (2 * s.h - std::max(0.0, high - low));
		}
		return sum;
	}
};

template <class T>
bool readAll(std::FILE* file, std::vector<T>& into) {
	return std::fread(into.data(), sizeof(T), into.size(), file) == into.size();
}

}  // namespace

int main(int argc, char** argv) {
	if (argc != 3) {
		std::fprintf(stderr, "usage: alike <scene.bin> <repeats>\n");
		return 2;
	}
	std::FILE* file = std::fopen(argv[1], "rb");
	std::vector<double> head(7);
	if (!file || !readAll(file, head)) {
		std::fprintf(stderr, "%s cannot be read\n", argv[1]);
		return 1;
	}
	const int count = int(head[0]);
	std::vector<double> at(size_t(3) * count);
	std::vector<Light> lights(static_cast<size_t>(head[1]));
	if (!readAll(file, at) || !readAll(file, lights)) {
		std::fprintf(stderr, "%s is too short\n", argv[1]);
		return 1;
	}
	std::fclose(file);
	const Sizes sizes{head[2], head[3], head[4], head[5]};
	const double half = head[6] / 2 * M_PI / 180;
	const double wide = sizes.w + sizes.sw, tall = sizes.h + sizes.sh;
	const double whole = 4 * sizes.w * sizes.h;
	const int repeats = std::atoi(argv[2]);

	std::vector<double> passes(repeats, 0);
	double lists = 0, sum = 0;
	std::vector<Neighbour> near;
	std::vector<size_t> starts(size_t(count) + 1);
	Union found;
	for (size_t first = 0; first < lights.size();) {
		size_t end = first;
		while (end < lights.size() && lights[end].sector == lights[first].sector) end++;
		const double listsBegan = processorMs();
		const double middle = (lights[first].sector + 0.5) * 2 * half;
		const double sin = std::sin(middle), cos = std::cos(middle);
		const double lowest = lights[end - 1].sine;
		const double aside = 2 * sizes.sw / std::cos(half), reach = 2 * sizes.sh;
		near.clear();
		for (int i = 0; i < count; i++) {
			starts[i] = near.size();
			for (int j = 0; j < count; j++) {
				if (j == i) continue;
				const double dx = at[3 * j] - at[3 * i], dy = at[3 * j + 1] - at[3 * i + 1];
				const double dz = at[3 * j + 2] - at[3 * i + 2];
				const double along = dx * sin + dy * cos;
				if (along <= -aside - reach) continue;
				if (std::fabs(dx * cos - dy * sin) >= aside + std::fabs(along) * std::tan(half)) continue;
				const double bound = highestSine(dx, dy, dz, reach, aside);
				if (bound > lowest) near.push_back({bound, dx, dy, dz});
			}
			std::sort(near.begin() + starts[i], near.end(),
				[](const Neighbour& a, const Neighbour& b) { return a.bound > b.bound; });
		}
		starts[count] = near.size();
		lists += processorMs() - listsBegan;
		for (int pass = 0; pass < repeats; pass++) {
			const double began = processorMs();
			double shares = 0;
			for (int i = 0; i < count; i++) {
				const Neighbour* begin = near.data() + starts[i];
				const Neighbour* stop = near.data() + starts[i + 1];
				if (begin == stop) continue;
				const Neighbour* last = begin;
				for (size_t k = first; k < end; k++) {
					const Light& light = lights[k];
					while (last != stop && last->bound > light.sine) last++;
					const double* a = light.axes;
					found.x.clear();
					found.y.clear();
					for (const Neighbour* n = begin; n != last; n++) {
						const double x = a[0] * n->dx + a[1] * n->dy + a[2] * n->dz;
						if (x >= wide || x <= -wide) continue;
						const double y = a[3] * n->dx + a[4] * n->dy + a[5] * n->dz;
						if (y >= tall || y <= -tall) continue;
						if (a[6] * n->dx + a[7] * n->dy + a[8] * n->dz <= UP_SUN_M) continue;
						found.x.push_back(x);
						found.y.push_back(y);
					}
					if (!found.x.empty()) shares += std::min(1.0, found.area(sizes) / whole);
				}
			}
			passes[pass] += processorMs() - began;
			if (pass == 0) sum += shares;
		}
		first = end;
	}
	std::sort(passes.begin(), passes.end());
	std::printf("{\"processorMs\": %.6f, \"listsMs\": %.6f, \"sumOfShares\": %.9f}\n", passes[repeats / 2], lists, sum);
	return 0;
}
