using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>What adjustments ask of every endpoint: its family, its weight, its place in the dictionary.</summary>
internal sealed class EndpointTraits
{
    private readonly string[] _families;
    private readonly double[] _weights;
    private readonly int[] _places;

    /// <summary>The traits of the endpoints of a run.</summary>
    /// <param name="endpoints">Number of endpoints.</param>
    /// <param name="describe">What is known of an endpoint, by its position in the data.</param>
    public EndpointTraits(int endpoints, Func<int, EndpointInfo> describe)
    {
        _families = new string[endpoints];
        _weights = new double[endpoints];
        _places = new int[endpoints];
        for (int endpoint = 0; endpoint < endpoints; endpoint++)
        {
            EndpointInfo info = describe(endpoint);
            _families[endpoint] = info.Family;
            _weights[endpoint] = info.Weight;
            _places[endpoint] = info.Place;
        }
    }

    /// <summary>Name of an endpoint's family.</summary>
    public string Family(int endpoint) => _families[endpoint];

    /// <summary>An endpoint's weight.</summary>
    public double Weight(int endpoint) => _weights[endpoint];

    /// <summary>An endpoint's place in the order of testing; endpoints with the same place keep the order of the data.</summary>
    public int Place(int endpoint) => _places[endpoint];
}
