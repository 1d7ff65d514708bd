// Shaded shares by R x R rays a table with Embree, one thread: usage shade <scenes.bin> <R>.
// The file holds doubles: scenes, tables, least cosine; for each scene the way to the sun, then for each table its
// middle, u, v, n, half glass width and height, half steel width and height, half slot, cosine, exact share.
// Prints one JSON object: processor milliseconds of building and asking, and the error against the exact shares.
#include <embree3/rtcore.h>

#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <ctime>
#include <vector>

namespace {

struct Table {
	double centre[3], u[3], v[3], n[3];
	double halfWidth, halfHeight, steelHalfWidth, steelHalfHeight, halfGap, cosine, share;
};
static_assert(sizeof(Table) == 19 * sizeof(double), "as written by the bench");

// Rays start this far off the glass, metres: coordinates are single precision.
const double OFF_GLASS_M = 1e-3;
const int PACKET = 16;

double processorMs() {
	timespec now;
	clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &now);
	return now.tv_sec * 1e3 + now.tv_nsec / 1e6;
}

RTCScene sceneOf(RTCDevice device, const Table* tables, int count) {
	int quads = 0;
	for (int i = 0; i < count; i++) quads += tables[i].halfGap > 0 ? 2 : 1;
	RTCGeometry geometry = rtcNewGeometry(device, RTC_GEOMETRY_TYPE_QUAD);
	auto* points = static_cast<float*>(rtcSetNewGeometryBuffer(
		geometry, RTC_BUFFER_TYPE_VERTEX, 0, RTC_FORMAT_FLOAT3, 3 * sizeof(float), 4 * quads));
	auto* corners = static_cast<unsigned*>(rtcSetNewGeometryBuffer(
		geometry, RTC_BUFFER_TYPE_INDEX, 0, RTC_FORMAT_UINT4, 4 * sizeof(unsigned), quads));
	int point = 0;
	for (int i = 0; i < count; i++) {
		const Table& t = tables[i];
		const int parts = t.halfGap > 0 ? 2 : 1;
		for (int part = 0; part < parts; part++) {
			const double x0 = parts == 2 && part == 1 ? t.halfGap : -t.steelHalfWidth;
			const double x1 = parts == 2 && part == 0 ? -t.halfGap : t.steelHalfWidth;
			for (int k = 0; k < 4; k++) {
				const double x = k == 0 || k == 3 ? x0 : x1;
				const double y = k < 2 ? -t.steelHalfHeight : t.steelHalfHeight;
				for (int c = 0; c < 3; c++) points[3 * point + c] = float(t.centre[c] + x * t.u[c] + y * t.v[c]);
				corners[point] = unsigned(point);
				point++;
			}
		}
	}
	rtcCommitGeometry(geometry);
	RTCScene scene = rtcNewScene(device);
	rtcAttachGeometry(scene, geometry);
	rtcReleaseGeometry(geometry);
	rtcCommitScene(scene);
	return scene;
}

double shareOf(RTCScene scene, const Table& t, const double* s, int across) {
	RTCIntersectContext context;
	rtcInitIntersectContext(&context);
	context.flags = RTC_INTERSECT_CONTEXT_FLAG_COHERENT;
	RTCRay16 rays;
	alignas(64) int valid[PACKET];
	const int total = across * across;
	int hits = 0;
	for (int from = 0; from < total; from += PACKET) {
		for (int k = 0; k < PACKET; k++) {
			const int at = from + k;
			valid[k] = at < total ? -1 : 0;
			const double along = (2.0 * (at / across) + 1 - across) / across * (t.halfWidth - t.halfGap);
			// Even over the glass: the slot is stepped over.
			const double x = along > 0 ? along + t.halfGap : along < 0 ? along - t.halfGap : 0;
			const double y = (2.0 * (at % across) + 1 - across) / across * t.halfHeight;
			double o[3];
			for (int c = 0; c < 3; c++) o[c] = t.centre[c] + x * t.u[c] + y * t.v[c] + OFF_GLASS_M * t.n[c];
			rays.org_x[k] = float(o[0]);
			rays.org_y[k] = float(o[1]);
			rays.org_z[k] = float(o[2]);
			rays.dir_x[k] = float(s[0]);
			rays.dir_y[k] = float(s[1]);
			rays.dir_z[k] = float(s[2]);
			rays.tnear[k] = 0;
			rays.tfar[k] = INFINITY;
			rays.time[k] = 0;
			rays.mask[k] = ~0u;
			rays.id[k] = unsigned(k);
			rays.flags[k] = 0;
		}
		rtcOccluded16(valid, scene, &context, &rays);
		for (int k = 0; k < PACKET; k++) hits += valid[k] && rays.tfar[k] < 0;
	}
	return double(hits) / total;
}

}  // namespace

int main(int argc, char** argv) {
	if (argc != 3) {
		std::fprintf(stderr, "usage: shade <scenes.bin> <rays across>\n");
		return 2;
	}
	std::FILE* file = std::fopen(argv[1], "rb");
	double head[3];
	if (!file || std::fread(head, sizeof(double), 3, file) != 3) {
		std::fprintf(stderr, "%s cannot be read\n", argv[1]);
		return 1;
	}
	const int scenes = int(head[0]);
	const int count = int(head[1]);
	const int across = std::atoi(argv[2]);
	std::vector<double> suns(3 * scenes);
	std::vector<Table> tables(size_t(scenes) * count);
	for (int k = 0; k < scenes; k++) {
		if (std::fread(&suns[3 * k], sizeof(double), 3, file) != 3 ||
			std::fread(&tables[size_t(k) * count], sizeof(Table), count, file) != size_t(count)) {
			std::fprintf(stderr, "%s is too short\n", argv[1]);
			return 1;
		}
	}
	std::fclose(file);
	RTCDevice device = rtcNewDevice("threads=1");
	std::vector<double> shares(tables.size(), 0);
	const double began = processorMs();
	for (int k = 0; k < scenes; k++) {
		const Table* own = &tables[size_t(k) * count];
		RTCScene scene = sceneOf(device, own, count);
		for (int i = 0; i < count; i++) {
			if (own[i].cosine > head[2])
				shares[size_t(k) * count + i] = shareOf(scene, own[i], &suns[3 * k], across);
		}
		rtcReleaseScene(scene);
	}
	const double used = processorMs() - began;
	double sum = 0, largest = 0;
	long partly = 0;
	for (size_t at = 0; at < tables.size(); at++) {
		const Table& t = tables[at];
		if (t.cosine <= head[2]) continue;
		const double error = 100 * std::fabs(shares[at] - t.share);
		if (error > largest) largest = error;
		if (t.share > 0 && t.share < 1) {
			sum += error;
			partly++;
		}
	}
	std::printf("{\"processorMs\": %.6f, \"meanErrorPercent\": %.9f, \"maxErrorPercent\": %.9f, \"partly\": %ld}\n", used,
		partly ? sum / partly : 0.0, largest, partly);
	rtcReleaseDevice(device);
	return 0;
}
